import { between } from '../../src/demo/simulate/between';
import type { TrueCell } from '../../src/demo/simulate/cell';
import { runStraight } from '../../src/demo/simulate/run-straight';
import { spikeTrain } from '../../src/demo/simulate/spike-train';
import { seeded } from '../../src/lib/analysis/random/seeded';
import { decodeSession, sessionWindows } from '../../src/lib/analysis/session/decode-session';
import { sessionParameters } from '../../src/lib/analysis/session/parameters';
import { prepareGround, preparePath } from '../../src/lib/analysis/session/prepare';
import { samplesOfSpikes } from '../../src/lib/analysis/spikes/samples-of-spikes';
import { timeBlocks } from '../../src/lib/analysis/position/time-blocks';

const LENGTH_CM = 180;
const PARAMETERS = sessionParameters({ arena: `straight:${LENGTH_CM}` });

/** Cells with one field each, anywhere on a straight track of 180 cm. */
export function trackCells(count: number, seed: number): TrueCell[] {
	const random = seeded(seed, 'cells');
	return Array.from({ length: count }, (_, k) => ({
		name: String(k),
		bundle: 'T1',
		kind: 'principal',
		baseHz: between(random, 0.1, 0.6),
		fields: [
			{
				xCm: between(random, 0, LENGTH_CM),
				yCm: null,
				peakHz: between(random, 6, 18),
				sigmaCm: between(random, 8, 16),
				heading: 0
			}
		],
		amplitudeUv: 200
	}));
}

/** Decoding errors of one session, with what can be drawn for an interval. */
export interface DecodedRun {
	readonly errorCm: Float64Array;
	/** Block of each window, and lap; 0 … count − 1 without holes. */
	readonly block: Int32Array;
	readonly blocks: number;
	readonly lap: Int32Array;
	readonly laps: number;
}

/** A fresh session of the same cells, decoded with the defaults of a session. */
export function decodedRun(
	cells: readonly TrueCell[],
	durationS: number,
	blockS: number,
	seed: number
): DecodedRun {
	const random = seeded(seed, 'run');
	const ground = prepareGround(PARAMETERS);
	const run = runStraight(LENGTH_CM, durationS, random);
	const position = { tS: run.tS, xCm: run.xCm, yCm: null };
	const path = preparePath({ position, units: [], epochs: [] }, ground, PARAMETERS.minSpeedCmS, []);
	const units = cells.map((cell) => {
		const timesS = spikeTrain(cell, run, random);
		const samples = samplesOfSpikes(timesS, path.tS, path.standS);
		const used = samples.reduce((sum, i) => sum + (i >= 0 ? path.isUsed[i] : 0), 0);
		return { unit: cell.name, bundle: cell.bundle, timesS, samples, used };
	});
	const windows = sessionWindows(path, PARAMETERS.windowMs);
	const decoded = decodeSession(ground, path, units, PARAMETERS, windows, () => undefined);
	if (!decoded || !path.laps) throw new Error(`session ${seed} could not be decoded`);
	const { ofSample: lapOfSample } = path.laps;
	const { ofSample: blockOfSample } = timeBlocks(path.tS, path.stretch, blockS);
	const block = closedUp(Int32Array.from(windows.sample, (i) => blockOfSample[i]));
	const lap = closedUp(Int32Array.from(windows.sample, (i) => lapOfSample[i]));
	return {
		errorCm: Float64Array.from(decoded.decoded.bin, decoded.errorCm),
		block,
		blocks: Math.max(...block) + 1,
		lap,
		laps: Math.max(...lap) + 1
	};
}

/** The same groups numbered by their first window. */
function closedUp(group: Int32Array): Int32Array {
	const known = new Map<number, number>();
	for (const g of group) if (!known.has(g)) known.set(g, known.size);
	return group.map((g) => known.get(g) ?? -1);
}
