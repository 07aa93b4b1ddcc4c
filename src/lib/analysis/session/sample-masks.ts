import type { Path } from './prepared';

/** Samples that count and also pass a test, as 0 and 1. */
export function usedWhere(path: Path, passes: (sample: number) => boolean): Uint8Array {
	return path.isUsed.map((used, i) => (used && passes(i) ? 1 : 0));
}

/**
 * First and second half of the used time. The sample that crosses the middle belongs to the second.
 */
export function halves(path: Path): [Uint8Array, Uint8Array] {
	const doneS = new Float64Array(path.tS.length);
	let sum = 0;
	for (let i = 0; i < doneS.length; i++) {
		if (path.isUsed[i]) sum += path.standS[i];
		doneS[i] = sum;
	}
	const isFirst = (i: number) => doneS[i] <= sum / 2;
	return [usedWhere(path, isFirst), usedWhere(path, (i) => !isFirst(i))];
}

/**
 * Odd and even laps, or blocks of time where there are too few laps; the first one is odd. On a
 * straight track passes are counted by direction, so that both halves hold both.
 */
export function oddAndEven(path: Path): [Uint8Array, Uint8Array] {
	const { ofSample, round } = path.groups;
	const isOdd = (i: number) => (round ? round[ofSample[i]] : ofSample[i]) % 2 === 0;
	return [usedWhere(path, isOdd), usedWhere(path, (i) => !isOdd(i))];
}
