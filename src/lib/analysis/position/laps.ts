import { unwrapRing } from '../arena/ring';

/** Passes along a track. */
export interface Laps {
	readonly count: number;
	/**
	 * Lap of each sample, −1 outside every stretch. Laps follow each other without holes: what lies
	 * between two passes belongs to the earlier one, what lies before the first to the first.
	 */
	readonly ofSample: Int32Array;
	/**
	 * Number of each lap among those in its own direction. Odd and even rounds hold both directions;
	 * odd and even laps of a straight track would be the two directions.
	 */
	readonly round: Int32Array;
	/** +1 while running up the track, −1 down, 0 in end zones, turn-backs and off the track. */
	readonly direction: Int8Array;
}

/**
 * Passes along a straight track. Its ends are zones of a tenth of its length; a pass lasts from
 * leaving one zone to entering the other, a run that comes back to the zone it left is dropped.
 * @param xCm     distance along the track, NaN where unknown
 * @param stretch stretch of each sample, −1 for none; a pass never spans two
 */
export function straightLaps(xCm: Float64Array, stretch: Int32Array, lengthCm: number): Laps {
	const ofSample = new Int32Array(xCm.length).fill(-1);
	const direction = new Int8Array(xCm.length);
	const starts: number[] = [];
	const round: number[] = [];
	const passes = { up: 0, down: 0 };
	let zone = 0;
	let left = -1;
	for (let i = 0; i < xCm.length; i++) {
		if (stretch[i] < 0) continue;
		if (i === 0 || stretch[i] !== stretch[i - 1]) zone = 0;
		if (Number.isNaN(xCm[i])) continue;
		const here = xCm[i] < lengthCm * 0.1 ? -1 : xCm[i] > lengthCm * 0.9 ? 1 : 0;
		if (here === 0) continue;
		if (zone !== 0 && here !== zone) {
			starts.push(left + 1);
			round.push(here > 0 ? passes.up++ : passes.down++);
			direction.fill(here, left + 1, i);
		}
		zone = here;
		left = i;
	}
	fillBetween(ofSample, stretch, starts);
	return { count: starts.length, ofSample, round: Int32Array.from(round), direction };
}

/**
 * Laps of a ring: whole turns from where each stretch began, in either direction.
 * @param xCm distance along the ring, NaN where unknown
 */
export function ringLaps(xCm: Float64Array, stretch: Int32Array, lengthCm: number): Laps {
	const ofSample = new Int32Array(xCm.length).fill(-1);
	const known = new Map<string, number>();
	let first = 0;
	while (first < xCm.length) {
		let end = first + 1;
		while (end < xCm.length && stretch[end] === stretch[first]) end++;
		if (stretch[first] >= 0) {
			const run = unwrapRing(xCm.subarray(first, end), lengthCm);
			const origin = run.find((value) => !Number.isNaN(value)) ?? NaN;
			for (let i = 0; i < run.length; i++) {
				if (Number.isNaN(run[i])) continue;
				const key = `${stretch[first]} ${Math.floor((run[i] - origin) / lengthCm)}`;
				const lap = known.get(key) ?? known.size;
				known.set(key, lap);
				ofSample[first + i] = lap;
			}
		}
		first = end;
	}
	return {
		count: known.size,
		ofSample,
		round: Int32Array.from({ length: known.size }, (_, lap) => lap),
		direction: new Int8Array(xCm.length)
	};
}

function fillBetween(ofSample: Int32Array, stretch: Int32Array, starts: readonly number[]): void {
	if (starts.length === 0) return;
	let lap = 0;
	for (let i = 0; i < ofSample.length; i++) {
		while (lap + 1 < starts.length && i >= starts[lap + 1]) lap++;
		if (stretch[i] >= 0) ofSample[i] = lap;
	}
}
