import { foldsAt } from './folds-at';
import type { Fold } from './folds';
import type { Windows } from './windows';

/**
 * Folds of whole laps, in the order they were run: each lap by itself, or `wanted` folds whose
 * numbers of laps differ by one at most, larger ones first. Laps that lie in each other (an animal
 * that turns back on a ring takes up an earlier one) stay together, so no lap is ever both trained
 * on and tested.
 * @param lapOfSample lap of each position sample; a window has that of its middle. −1 (no lap) goes
 *   with the windows before, at the beginning with those after
 * @param wanted      null leaves one lap out at a time; at most that many folds are made
 * @returns none when there are fewer than two laps that can be told apart
 * @throws RangeError wanted is no whole number of 2 or more
 */
export function lapFolds(
	windows: Windows,
	lapOfSample: Int32Array,
	wanted: number | null = null
): Fold[] {
	if (wanted !== null && !(Number.isInteger(wanted) && wanted >= 2)) {
		throw new RangeError(`laps are cut into 2 folds or more, got ${wanted}`);
	}
	const begins = beginsOfLaps(Int32Array.from(windows.sample, (i) => lapOfSample[i]));
	const count = Math.min(begins.length, wanted ?? begins.length);
	if (count < 2) return [];
	const chosen: number[] = [];
	for (let f = 0, at = 0; f < count; f++) {
		chosen.push(begins[at]);
		at += Math.floor(begins.length / count) + (f < begins.length % count ? 1 : 0);
	}
	return foldsAt(windows, chosen);
}

/** First window of every lap, or of laps that lie in each other. */
function beginsOfLaps(lap: Int32Array): number[] {
	const last = new Map<number, number>();
	lap.forEach((k, w) => {
		if (k >= 0) last.set(k, w);
	});
	const begins: number[] = [];
	let until = -1;
	lap.forEach((k, w) => {
		if (k < 0) return;
		if (w > until) begins.push(begins.length === 0 ? 0 : w);
		until = Math.max(until, last.get(k) ?? w);
	});
	return begins;
}
