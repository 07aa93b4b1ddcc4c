import { nextCountLogPmf, overGap, type YieldModel } from '../trends/yield-model';
import { quantile } from '../statistics/quantile';
import type { Evidence } from './advice';

/** Recorded days after which an advance is looked at. */
const AFTER_DAYS = 3;
/** Fewer than this many earlier advances say nothing yet. */
const LEAST = 10;

/** An earlier advance of the lab whose tissue had settled. */
export interface PastAdvance {
	readonly um: number;
	/** Tally on the last recorded day before. */
	readonly before: number;
	/** Tally on the third recorded day after it settled. */
	readonly after: number;
	/** Model learnt before the move. */
	readonly model: YieldModel;
	/** Who chose: a person, or a coin that decided between today and three days later. */
	readonly chosenBy: 'person' | 'coin';
}

/** Middle and spread of a change in units. */
export interface Spread {
	readonly median: number;
	readonly low: number;
	readonly high: number;
}

export interface Gain {
	/** Earlier advances of like step. */
	readonly n: number;
	/** Change of the tally three recorded days after them, median and 10 to 90 %; null below ten. */
	readonly seen: Spread | null;
	/** What chance alone gives stable bundles found this low, the same measure. */
	readonly byChance: Spread;
}

/**
 * What an advance may bring: the change the lab saw after its earlier settled advances of like step
 * (half to twice as long), beside the change that regression to the mean alone gives to this
 * bundle, picked because its count is low. Never "it helped": moves were not assigned by chance.
 * @param evidence with a count
 */
export function gainOf(
	stepUm: number,
	{ units, model }: Pick<Evidence, 'units' | 'model'>,
	pastAdvances: readonly PastAdvance[]
): Gain {
	const like = pastAdvances.filter(({ um }) => um >= stepUm / 2 && um <= stepUm * 2);
	return {
		n: like.length,
		seen: like.length >= LEAST ? spreadOf(like.map((one) => one.after - one.before)) : null,
		byChance: regressionToTheMean([{ before: units ?? 0, model }])
	};
}

/**
 * Change of the tally over three recorded days that stable bundles show when they were picked at
 * these counts: a low count is partly bad luck, and luck does not last. Exact under the model of
 * survival and arrival, whose next days depend on the count alone; several bundles are mixed evenly.
 * @throws RangeError no bundle
 */
export function regressionToTheMean(
	picked: readonly { readonly before: number; readonly model: YieldModel }[]
): Spread {
	if (picked.length === 0) throw new RangeError('no bundle was picked');
	const chance = new Map<number, number>();
	for (const { before, model } of picked) {
		const after = overGap(model, AFTER_DAYS);
		// Twelve Poisson-like deviations above the mean hold all but 1e-12.
		const top = Math.ceil(before + after.arrivals + 12 * Math.sqrt(after.arrivals + 1));
		for (let n = 0; n <= top; n++) {
			const p = Math.exp(nextCountLogPmf(after, before, n)) / picked.length;
			chance.set(n - before, (chance.get(n - before) ?? 0) + p);
		}
	}
	const changes = [...chance].sort((a, b) => a[0] - b[0]);
	const at = (share: number) => {
		let below = 0;
		for (const [change, p] of changes) {
			below += p;
			if (below >= share) return change;
		}
		return changes[changes.length - 1][0];
	};
	return { median: at(0.5), low: at(0.1), high: at(0.9) };
}

/** Median and 10 to 90 % (type 7). */
export function spreadOf(values: readonly number[]): Spread {
	return {
		median: quantile(values, 0.5),
		low: quantile(values, 0.1),
		high: quantile(values, 0.9)
	};
}
