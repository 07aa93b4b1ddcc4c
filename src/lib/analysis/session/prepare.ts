import { isOneDimensional } from '../arena/arena';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { MARGIN_CM, placeInArena } from '../arena/place-in-arena';
import { LEAST_GROUPS } from '../decoding/bootstrap';
import { smootherOf } from '../maps/smoother';
import { stretchOfSamples, usedStretches } from '../position/epochs';
import { ringLaps, straightLaps, type Laps } from '../position/laps';
import { medianInterval } from '../position/median-interval';
import { speedOf } from '../position/speed';
import { standingTime } from '../position/standing-time';
import { timeBlocks } from '../position/time-blocks';
import { TableError } from '../tables/table-error';
import type { SessionInput } from './input';
import { ParameterError, type SessionParameters } from './parameters';
import type { Ground, Path } from './prepared';

/** Speed is measured over this long each way, s. */
const SPEED_REACH_S = 0.25;
/** Blocks of time that stand in for laps, s. */
const BLOCK_S = 20;

/** The arena of the parameters with its bins, distances and smoothing. */
export function prepareGround(parameters: SessionParameters): Ground {
	const arena = parseArena(parameters.arena);
	try {
		const bins = binsOf(arena, parameters.binCm);
		return {
			arena,
			bins,
			metric: metricOf(arena),
			smooth: smootherOf(arena, bins, parameters.smoothCm, 'zero'),
			minOccupancyS: parameters.minOccupancyS
		};
	} catch (error) {
		if (error instanceof RangeError) throw new ParameterError('binCm', error.message);
		throw error;
	}
}

/**
 * Puts a path into the arena and says which samples count: in a run stretch, with a place, at least
 * as fast as the least speed.
 * @param warnings gets a sentence for what was left out
 * @throws TableError when no sample lies in run time, or most lie outside the arena
 */
export function preparePath(
	input: SessionInput,
	ground: Ground,
	minSpeedCmS: number,
	warnings: string[]
): Path {
	const { tS, xCm, yCm } = input.position;
	const { arena, bins, metric } = ground;
	if (!isOneDimensional(arena) && !yCm) {
		throw new TableError('position', 'header', `a ${arena.kind} needs x_cm and y_cm`, 1);
	}
	const medianIntervalS = medianInterval(tS);
	const stretch = stretchOfSamples(tS, usedStretches(input.epochs));
	if (!stretch.some((k) => k >= 0)) {
		throw new TableError('epochs', 'no-overlap', 'no position lies in a run epoch');
	}
	const isRun = (i: number) => stretch[i] >= 0;
	const placed = placeInArena(arena, metric, xCm, yCm, isRun, input.ends);
	refuseMisfit(placed.xCm, placed.outside, input.position.firstRow ?? 2, warnings);
	const standS = standingTime(tS, stretch, medianIntervalS);
	const reach = Math.max(1, Math.round(SPEED_REACH_S / medianIntervalS));
	const speedCmS = speedOf(tS, placed.xCm, placed.yCm, stretch, reach, metric);
	const bin = new Int32Array(tS.length);
	const isUsed = new Uint8Array(tS.length);
	let usedS = 0;
	for (let i = 0; i < tS.length; i++) {
		bin[i] = bins.of(placed.xCm[i], placed.yCm[i]);
		if (stretch[i] < 0 || bin[i] < 0 || !(speedCmS[i] >= minSpeedCmS)) continue;
		isUsed[i] = 1;
		usedS += standS[i];
	}
	const laps = lapsOf(ground, placed.xCm, stretch);
	const hasLaps = laps !== null && laps.count >= LEAST_GROUPS;
	const groups = hasLaps ? laps : { ...timeBlocks(tS, stretch, BLOCK_S), round: null };
	return {
		tS,
		xCm: placed.xCm,
		yCm: placed.yCm,
		stretch,
		standS,
		speedCmS,
		bin,
		isUsed,
		medianIntervalS,
		usedS,
		laps,
		groups: { count: groups.count, ofSample: groups.ofSample, round: groups.round }
	};
}

function lapsOf({ arena }: Ground, xCm: Float64Array, stretch: Int32Array): Laps | null {
	if (arena.kind === 'straight') return straightLaps(xCm, stretch, arena.lengthCm);
	if (arena.kind === 'ring') return ringLaps(xCm, stretch, arena.lengthCm);
	return null;
}

function refuseMisfit(
	xCm: Float64Array,
	outside: number,
	firstRow: number,
	warnings: string[]
): void {
	if (outside === 0) return;
	const first = xCm.findIndex((x) => Number.isNaN(x));
	if (outside > xCm.length / 2) {
		throw new TableError(
			'position',
			'outside-arena',
			`${outside} of ${xCm.length} samples lie outside the arena by more than ${MARGIN_CM} cm; check its size, its origin and the scale of the positions`,
			first + firstRow
		);
	}
	warnings.push(
		`${outside} of ${xCm.length} positions lie outside the arena by more than ${MARGIN_CM} cm and are left out, the first in row ${first + firstRow}.`
	);
}
