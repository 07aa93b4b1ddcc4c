import type { MatchUnit } from '../../src/lib/analysis/matching/match-unit';
import {
	CORRELOGRAM_BIN_S,
	CORRELOGRAM_REACH_S,
	matchCorrelogram
} from '../../src/lib/analysis/matching/match-correlogram';
import { autocorrelogram } from '../../src/lib/analysis/maps/autocorrelogram';
import type { Random } from '../../src/lib/analysis/random/seeded';
import {
	normal,
	SAMPLES,
	SAMPLING_HZ,
	simulatedCell,
	spikeTrain,
	waveformOf,
	type Cell
} from './simulated-cell';

/** A unit as a sorter would have cut it, and the cell it is. */
export interface SimulatedUnit extends MatchUnit {
	readonly cell: number;
}

export interface SimulatedDay {
	readonly day: number;
	readonly bundleDepthUm: number;
	readonly units: readonly SimulatedUnit[];
}

const DURATION_S = 900;
/** Cells smaller than this on every channel are not cut, µV. */
const LEAST_UV = 70;
const SURVIVAL = 0.8;
const MISSED = 0.08;
const CELLS = 8;

/**
 * A tetrode over several days. Each day the brain moves against it (σ 6 µm an axis) and each cell on its
 * own (σ 4 µm), shape, rate and bursting change, cells are lost (a fifth), come and are missed, and
 * what is cut carries noise, a few spikes of others and a trace of another cell's waveform.
 * Nothing here draws from the laws the matching scores with.
 */
export function simulatedBundle(days: number, random: Random): SimulatedDay[] {
	let born = 0;
	const birth = (): Cell => {
		for (;;) {
			const cell = simulatedCell(born, random);
			if (troughUv(waveformOf(cell)) >= LEAST_UV) {
				born++;
				return cell;
			}
		}
	};
	let cells = Array.from({ length: CELLS - 3 + random.below(7) }, birth);
	return Array.from({ length: days }, (_, day) => {
		if (day > 0) {
			const shiftUm = [normal(random), normal(random), normal(random)].map((step) => 6 * step);
			cells = cells
				.filter(() => random.next() < SURVIVAL)
				.map((cell) => nextDay(cell, shiftUm, random));
			for (let k = 0; k < CELLS; k++) if (random.next() < 1 - SURVIVAL) cells.push(birth());
		}
		const seen = cells.filter(
			(cell) => troughUv(waveformOf(cell)) >= 0.7 * LEAST_UV && random.next() >= MISSED
		);
		const units = seen.map((cell) => cut(cell, seen, random));
		return { day, bundleDepthUm: 2000, units };
	});
}

function troughUv(uv: Float64Array): number {
	return -Math.min(...uv);
}

function nextDay(cell: Cell, shiftUm: readonly number[], random: Random): Cell {
	const [x, y, z] = cell.placeUm.map((um, axis) => um + shiftUm[axis] + 4 * normal(random));
	const odds = (cell.burstShare / (1 - cell.burstShare)) * Math.exp(0.4 * normal(random));
	return {
		...cell,
		placeUm: [x, y, z],
		sourceUv: cell.sourceUv * Math.exp(0.08 * normal(random)),
		widthMs: cell.widthMs * Math.exp(0.05 * normal(random)),
		burstShare: odds / (1 + odds),
		burstIntervalMs: cell.burstIntervalMs * Math.exp(0.06 * normal(random))
	};
}

function cut(cell: Cell, all: readonly Cell[], random: Random): SimulatedUnit {
	// The day's rate is its own: the animal runs more or less through the fields of the cell.
	const rateHz = cell.rateHz * Math.exp((cell.isInterneuron ? 0.15 : 0.35) * normal(random));
	const own = spikeTrain({ ...cell, rateHz }, DURATION_S, random);
	const foreign = Math.floor(own.length * 0.08 * random.next());
	const timesS = Float64Array.from([
		...own,
		...Array.from({ length: foreign }, () => DURATION_S * random.next())
	]).sort();
	// Sorters line spikes up on their trough, to half a sample or so.
	const lateMs = (1000 / SAMPLING_HZ) * 0.5 * normal(random);
	const delayMs = cell.delayMs.map((ms) => ms + lateMs);
	const uv = waveformOf({ ...cell, delayMs });
	const other = waveformOf(all[random.below(all.length)]);
	const share = 0.12 * random.next();
	const noiseUv = Math.hypot(14 / Math.sqrt(timesS.length), 2.5);
	const gains = Array.from({ length: 4 }, () => Math.exp(0.06 * normal(random)));
	const measured = uv.map((value, i) => {
		const mixed = (1 - share) * value + share * other[i];
		return gains[Math.floor(i / SAMPLES)] * mixed + noiseUv * normal(random);
	});
	const lags = { binS: CORRELOGRAM_BIN_S, reachS: CORRELOGRAM_REACH_S };
	return {
		cell: cell.id,
		waveform: { uv: measured, channels: 4 },
		correlogram: matchCorrelogram(autocorrelogram(timesS, lags)),
		rateHz: timesS.length / DURATION_S,
		depthUm: NaN
	};
}
