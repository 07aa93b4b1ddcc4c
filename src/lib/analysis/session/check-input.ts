import { medianInterval } from '../position/median-interval';
import { TableError } from '../tables/table-error';
import type { SessionInput } from './input';

/** No tracker is this slow; such a step means that times are not in seconds. */
const SLOWEST_S = 1;
/** Seconds that a path must last to say anything. */
const LEAST_DURATION_S = 1;

/**
 * Refuses a session that could only give nonsense: unordered or non-finite times, times that are not
 * seconds, no spikes, spikes of another moment.
 * @param warnings gets a sentence for what was let pass
 * @throws TableError with the table, and the row where one can be named
 */
export function checkInput({ position, units }: SessionInput, warnings: string[]): void {
	const { tS } = position;
	checkPath(position, warnings);
	checkSpikes(units, tS[0], tS[tS.length - 1]);
}

/**
 * The part of it that concerns positions alone, for when they come before the spikes.
 * @throws TableError
 */
export function checkPath(position: SessionInput['position'], warnings: string[]): void {
	const { tS } = position;
	if (tS.length < 2) {
		throw new TableError(
			'position',
			'too-short',
			`${tS.length} samples are too few to say anything`
		);
	}
	const repeated = checkOrder(position);
	if (repeated > 0) {
		warnings.push(
			`${repeated === 1 ? '1 position stands' : `${repeated} positions stand`} twice in the table, same time and place; the second counts for no time.`
		);
	}
	const stepS = medianInterval(tS);
	if (stepS >= SLOWEST_S) {
		throw new TableError(
			'position',
			'unit-of-time',
			`samples are ${Number(stepS.toPrecision(3))} s apart, so the times are probably in milliseconds or microseconds; give them in seconds`
		);
	}
	const durationS = tS[tS.length - 1] - tS[0];
	if (durationS < LEAST_DURATION_S) {
		throw new TableError('position', 'too-short', `${durationS} s of positions are too few`);
	}
}

/**
 * Times must grow. Trackers now and then write a sample twice; a row that is wholly the same as the
 * one before is let pass and stands for no time.
 * @returns how many rows stand twice
 */
function checkOrder({ tS, xCm, yCm, firstRow = 2 }: SessionInput['position']): number {
	let repeated = 0;
	for (let i = 1; i < tS.length; i++) {
		if (tS[i] > tS[i - 1]) continue;
		const isBack = tS[i] < tS[i - 1];
		const isSame = !isBack && xCm[i] === xCm[i - 1] && (!yCm || yCm[i] === yCm[i - 1]);
		if (!isSame) {
			const what = isBack ? 'lies before' : 'is the same as';
			const reason = `the time ${tS[i]} s ${what} the one above it; times must grow`;
			throw new TableError('position', 'time-order', reason, i + firstRow, 't_s');
		}
		repeated++;
	}
	return repeated;
}

/**
 * Refuses spikes that share no moment with the positions.
 * @throws TableError
 */
export function checkSpikes(units: SessionInput['units'], firstS: number, lastS: number): void {
	const all = units.reduce((sum, { timesS }) => sum + timesS.length, 0);
	if (all === 0) throw new TableError('spikes', 'no-spikes', 'the table holds no spike');
	const between = (from: number, to: number) =>
		units.reduce((sum, { timesS }) => sum + below(timesS, to) - below(timesS, from), 0);
	const inside = between(firstS, lastS);
	const from = units.reduce(
		(least, { timesS: [first = Infinity] }) => Math.min(least, first),
		Infinity
	);
	const to = units.reduce(
		(most, { timesS }) => Math.max(most, timesS.at(-1) ?? -Infinity),
		-Infinity
	);
	const range = `spikes from ${from} to ${to} s and positions from ${firstS} to ${lastS} s`;
	if (inside < all / 100 && between(firstS * 1000, lastS * 1000) > all / 4) {
		const reason = `${range}: these spikes would fit as milliseconds; give them in seconds`;
		throw new TableError('spikes', 'unit-of-time', reason);
	}
	if (inside > 0) return;
	const reason = `${range} share no moment; are both on the recorder’s clock?`;
	throw new TableError('spikes', 'no-overlap', reason);
}

/** How many of the ascending times lie below a limit. */
function below(timesS: Float64Array, limitS: number): number {
	let low = 0;
	let high = timesS.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if (timesS[middle] < limitS) low = middle + 1;
		else high = middle;
	}
	return low;
}
