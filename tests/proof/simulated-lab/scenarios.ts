import { ADVICE_DEFAULTS } from '../../../src/lib/analysis/advice/parameters';
import { seeded } from '../../../src/lib/analysis/random/seeded';
import { AMPLITUDE } from '../../../src/lib/analysis/trends/amplitude-evidence';
import type { YieldModel } from '../../../src/lib/analysis/trends/yield-model';
import type { Plan } from './lab';

/** Six units in the long run. */
export const USUAL: YieldModel = { survival: 0.8, arrivals: 1.2 };
/** One unit in the long run, and three. */
export const COLLAPSED: YieldModel = { survival: 0.55, arrivals: 0.5 };
export const HALVED: YieldModel = { survival: 0.7, arrivals: 0.9 };

/** Day on which a change begins. */
export const CHANGE_DAY = 20;

/** A lab that listens on nearly every recorded day and mostly hears right. */
export const ATTENTIVE = { rowShare: 0.9, rightShare: 0.85 };
/** A lab that would take every advance. */
export const DEAF = { rowShare: 1, rightShare: 1 };

export const STABLE: Plan = {
	bundles: 16,
	days: 60,
	askFrom: 5,
	usual: () => USUAL,
	truth: () => ({ model: USUAL, level: 0, place: 'in' }),
	seenShare: () => 1,
	isByEye: false,
	reader: () => 'A',
	missingShare: 0.1,
	listening: ATTENTIVE,
	parameters: ADVICE_DEFAULTS,
	isFollowed: true
};

/** Bundles of all sizes: 2 to 13 units, staying 1 to 10 days. */
export function mixed(seed: number): Plan {
	const random = seeded(seed, 'mixed bundles');
	const models = Array.from({ length: 8 + random.below(25) }, (): YieldModel => {
		const survival = 0.65 + 0.25 * random.next();
		return { survival, arrivals: (2 + 11 * random.next()) * (1 - survival) };
	});
	return {
		...STABLE,
		bundles: models.length,
		usual: (b) => models[b],
		truth: (b) => ({ model: models[b], level: 0, place: 'in' })
	};
}

/** The first bundles change on one day; the tip has come to stand above the layer. */
export function changing(to: YieldModel, changed: number, plan: Plan = STABLE): Plan {
	return {
		...plan,
		truth: (b, day) =>
			b < changed && day >= CHANGE_DAY
				? { model: to, level: AMPLITUDE.delta, place: 'above' }
				: plan.truth(b, day)
	};
}

/** Fewer newcomers every day: half of them after 46 days, the amplitude sinking with them. */
export const DRIFTING: Plan = {
	...STABLE,
	truth: (_, day) => {
		const left = 0.985 ** Math.max(0, day - 10);
		return {
			model: { ...USUAL, arrivals: USUAL.arrivals * left },
			level: 0.3 * Math.log(left),
			place: 'in'
		};
	}
};

/** Part of every bundle is not seen on some days. */
export function dimmed(days: readonly number[], share: number, plan: Plan = STABLE): Plan {
	return { ...plan, seenShare: (day) => (days.includes(day) ? share : 1) };
}
