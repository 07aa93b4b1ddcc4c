import { drawNormal } from '$lib/analysis/random/normal-draw';
import { seeded } from '$lib/analysis/random/seeded';
import type { TrueCell } from './cell';
import type { TruePath } from './path';
import { spikeTrain } from './spike-train';

/** A session as the rig would hand it over: tables, and what was truly there. */
export interface Recording {
	positionCsv: string;
	spikesCsv: string;
	unitsCsv: string;
	/** Labels in the file, in order of the cells given. */
	labels: string[];
}

/** Error of the simulated tracker, cm. */
const TRACKER_CM = 0.4;

/** The noise on a simulated channel, µV. */
const NOISE_UV = 22;

/**
 * Writes a run of simulated cells as the tables a lab uploads.
 * @param origin where the arena's origin lies in the camera's plane, cm
 */
export function recordRun(
	path: TruePath,
	cells: readonly TrueCell[],
	seed: number,
	origin: { xCm: number; yCm: number }
): Recording {
	const labels = cells.map((_, k) => String(k + 1));
	const trains = cells.map((cell) => spikeTrain(cell, path, seeded(seed, `spikes ${cell.name}`)));
	return {
		positionCsv: positionCsv(path, seed, origin),
		spikesCsv: spikesCsv(cells, labels, trains),
		unitsCsv: unitsCsv(cells, labels),
		labels
	};
}

function positionCsv(path: TruePath, seed: number, origin: { xCm: number; yCm: number }): string {
	const random = seeded(seed, 'tracker');
	const rows = ['t_s,x_cm,y_cm'];
	for (let i = 0; i < path.tS.length; i++) {
		const x = path.xCm[i] + origin.xCm + TRACKER_CM * drawNormal(random);
		const y = path.yCm[i] + origin.yCm + TRACKER_CM * drawNormal(random);
		rows.push(`${path.tS[i].toFixed(4)},${x.toFixed(2)},${y.toFixed(2)}`);
	}
	return rows.join('\n') + '\n';
}

function spikesCsv(
	cells: readonly TrueCell[],
	labels: readonly string[],
	trains: readonly Float64Array[]
): string {
	const rows: string[] = ['unit,t_s,bundle'];
	trains.forEach((train, k) => {
		for (const t of train) rows.push(`${labels[k]},${t.toFixed(5)},${cells[k].bundle}`);
	});
	return rows.join('\n') + '\n';
}

function unitsCsv(cells: readonly TrueCell[], labels: readonly string[]): string {
	const rows = cells.map((cell, k) =>
		[labels[k], cell.bundle, cell.kind, cell.amplitudeUv.toFixed(1), NOISE_UV].join(',')
	);
	return ['unit,bundle,class,amplitude_uv,noise_uv', ...rows].join('\n') + '\n';
}
