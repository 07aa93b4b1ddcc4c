import { seeded } from '../../../src/lib/analysis/random/seeded';
import { quantile } from '../../../src/lib/analysis/statistics/quantile';
import { nameOf, type LabDay } from './lab';
import { CHANGE_DAY } from './scenarios';

/** Advances of a run for bundles that had not changed, and the animal-months of 16 bundles behind it. */
export function falseAdvances(
	days: readonly LabDay[],
	changed = 0
): { count: number; months: number } {
	let count = 0;
	let bundleDays = 0;
	for (const { advice } of days) {
		bundleDays += Math.max(0, advice.length - changed);
		count += advice.slice(changed).filter(({ state }) => state === 'advance').length;
	}
	return { count, months: bundleDays / (16 * 30) };
}

/** Recorded days from the change to the first day on which something holds, or Infinity. */
export function delay(
	days: readonly LabDay[],
	bundle: number,
	holds: (advice: LabDay['advice'][number]) => boolean
): number {
	let recorded = 0;
	for (const { day, advice } of days) {
		if (day < CHANGE_DAY || advice.length === 0) continue;
		recorded++;
		if (holds(advice[bundle])) return recorded;
	}
	return Infinity;
}

/** Whether the statistic stood at its limit for an advance on some day before the change. */
export function hadAlarm(days: readonly LabDay[], bundle: number): boolean {
	return days.some(
		({ day, advice }) =>
			day < CHANGE_DAY &&
			advice.length > 0 &&
			advice[bundle].evidence.statistic >= advice[bundle].evidence.advanceAt &&
			advice[bundle].evidence.tallies >= 8
	);
}

/** Largest statistic over its limit within the first recorded days after the change. */
export function peak(days: readonly LabDay[], bundle: number, recorded = 5): number {
	const after = days.filter(({ day, advice }) => day >= CHANGE_DAY && advice.length > 0);
	return Math.max(
		...after.slice(0, recorded).map(({ advice }) => {
			const { bundle: code, evidence } = advice[bundle];
			if (code !== nameOf(bundle)) throw new Error('advice out of order');
			return evidence.statistic / evidence.advanceAt;
		})
	);
}

/** Delays in one line; Infinity is "never". */
export function delays(values: readonly number[]): { median: number; p90: number } {
	const sorted = [...values].sort((a, b) => a - b);
	const at = (q: number) => sorted[Math.min(sorted.length - 1, Math.ceil(q * sorted.length) - 1)];
	return { median: at(0.5), p90: at(0.9) };
}

/** Area under the ROC curve: how often a changed bundle peaks above a stable one, ties by half. */
export function rocArea(stable: readonly number[], changed: readonly number[]): number {
	let wins = 0;
	for (const a of stable) for (const b of changed) wins += b > a ? 1 : b === a ? 0.5 : 0;
	return wins / (stable.length * changed.length);
}

/** 95 % interval of the area by drawing whole animals with replacement. */
export function rocInterval(
	animals: readonly { readonly stable: readonly number[]; readonly changed: readonly number[] }[],
	draws = 200
): { low: number; high: number } {
	const random = seeded(9, 'animals');
	const areas = Array.from({ length: draws }, () => {
		const drawn = animals.map(() => animals[random.below(animals.length)]);
		return rocArea(
			drawn.flatMap(({ stable }) => stable),
			drawn.flatMap(({ changed }) => changed)
		);
	});
	return { low: quantile(areas, 0.025), high: quantile(areas, 0.975) };
}
