import { describe, expect, it } from 'vitest';
import {
	animalHistory,
	asking,
	bundleHistory,
	FALLEN,
	fallenBundle,
	landmark,
	move,
	recordedDay,
	recordedDays,
	STEADY
} from '../../../../tests/factories/advice-history';
import { seeded, type Random } from '../random/seeded';
import { advise } from './advise';
import { followAnimal, followDay, NOTHING_FOLLOWED } from './follow';
import type { AnimalHistory, Asking, BundleHistory, LandmarkPlace } from './history';
import { ADVICE_DEFAULTS } from './parameters';
import { settledAtH } from './settled';
import { standardStep } from './standard-step';

const thresholds = () => ({ watchAt: 1.5, advanceAt: 2.5 });
const LAST = FALLEN.length - 1;

/** So many bundles, the first of them fallen on days of their own: no common cause. */
function herd(fallen: number, of: number): BundleHistory[] {
	return Array.from({ length: of }, (_, b) => {
		const bundle = `T${String(b + 1).padStart(2, '0')}`;
		if (b >= fallen) return bundleHistory({ bundle, days: recordedDays([...STEADY, 6, 6, 6, 6]) });
		// The earlier ones fell a day earlier each, and rest at one unit since.
		const steady = STEADY.slice(0, STEADY.length - b);
		const days = recordedDays([...steady, 3, 2, 1, 1, ...Array<number>(b).fill(1)]);
		return fallenBundle({ bundle, days });
	});
}

describe('share of a day', () => {
	const advancing = (bundles: readonly BundleHistory[], over: Partial<AnimalHistory> = {}) =>
		advise(animalHistory(bundles, over), asking(LAST), { thresholds })
			.filter(({ state }) => state === 'advance')
			.map(({ bundle }) => bundle);

	it('is a quarter of the recording bundles, the strongest evidence first', () => {
		const all = advise(animalHistory(herd(3, 8)), asking(LAST), { thresholds });
		const strongest = all
			.slice(0, 3)
			.toSorted((a, b) => b.evidence.statistic - a.evidence.statistic)
			.map(({ bundle }) => bundle);
		expect(advancing(herd(3, 8)).toSorted()).toEqual(strongest.slice(0, 2).toSorted());
		const capped = all.find(({ bundle }) => bundle === strongest[2]);
		expect(capped).toMatchObject({ state: 'watch', reason: 'quarter-cap', step: null });
		expect(capped?.trace.at(-1)).toMatchObject({
			rule: 12,
			hasFired: true,
			inputs: { recording: 8, allowed: 2 }
		});
	});

	it('rounds down, but leaves one to small drives', () => {
		expect(advancing(herd(3, 7))).toHaveLength(1);
		expect(advancing(herd(2, 2))).toHaveLength(1);
		expect(advancing(herd(3, 12))).toHaveLength(3);
	});

	it('counts recording bundles only, and those advised earlier that day', () => {
		const mixed = herd(3, 8).map((one, b) => (b < 4 ? one : { ...one, role: 'spare' }));
		expect(advancing(mixed)).toHaveLength(1);
		const advances = [{ bundle: 'T08', day: LAST }];
		expect(advancing(herd(3, 8), { advances })).toHaveLength(1);
		expect(advancing(herd(3, 8), { advances: [{ bundle: 'T08', day: LAST - 1 }] })).toHaveLength(2);
	});

	it('does not touch lowering', () => {
		const lowering = Array.from({ length: 4 }, (_, b) =>
			bundleHistory({ bundle: `T0${b}`, isInLayer: false, depthUm: 900, days: [] })
		);
		expect(advancing(lowering)).toHaveLength(4);
	});

	it('goes by code among equals, whatever the order of the list', () => {
		const twins = ['T03', 'T01', 'T02'].map((bundle) => fallenBundle({ bundle }));
		expect(advancing(twins)).toEqual(['T01']);
	});
});

describe('tally between advances', () => {
	const advances = [{ bundle: 'T01', day: LAST }];
	const next = (over: Partial<BundleHistory>) =>
		advise(animalHistory([fallenBundle(over)], { advances }), asking(LAST + 1), { thresholds })[0];

	it('is asked for before a second one, whether or not the first was carried out', () => {
		expect(next({})).toMatchObject({
			state: 'watch',
			reason: 'tally-first',
			change: { by: 'tallies' }
		});
	});

	it('is enough when a day has been counted since, unless it was left out', () => {
		const days = recordedDays([...FALLEN, 1]);
		expect(next({ days }).state).toBe('advance');
		const out = days.map((day) => ({ ...day, isLeftOut: day.day > LAST }));
		expect(next({ days: out }).reason).toBe('tally-first');
	});

	it('starts the statistic anew after a move', () => {
		const moved = next({
			moves: [move(LAST, 13, 40)],
			days: recordedDays([...FALLEN, 1])
		});
		expect(moved.evidence).toMatchObject({ statistic: 0, tallies: 1 });
	});
});

describe('followAnimal', () => {
	it('is the same day by day as at once', () => {
		const animal = animalHistory(herd(3, 8));
		let followed = NOTHING_FOLLOWED;
		for (let day = 0; day <= LAST; day++) {
			followed = followDay(followed, animal, day, ADVICE_DEFAULTS);
		}
		expect(followed).toEqual(followAnimal(animal, LAST, ADVICE_DEFAULTS));
	});

	it('compares matched units only with the recorded day that they were matched to', () => {
		const days = [...STEADY, 5, 5].map((n, day) => recordedDay(day, n, { kept: 5 }));
		const out = days.map((day) => ({ ...day, isLeftOut: day.day === 12 }));
		const last = (list: typeof days) =>
			followAnimal(animalHistory([bundleHistory({ days: list })]), 13, ADVICE_DEFAULTS)
				.bundles.get('T01')
				?.get('A')?.fall.last;
		expect(last(days)?.kept).toBe(5);
		expect(last(out)?.kept).toBeNull();
	});

	it('keeps the counts of two people apart: a stricter reader is no fall', () => {
		const days = Array.from({ length: 24 }, (_, day) =>
			day % 2 === 0 ? recordedDay(day, 6) : recordedDay(day, 3, { reader: 'B' })
		);
		const [advice] = advise(animalHistory([bundleHistory({ days })]), asking(23), { thresholds });
		expect(advice).toMatchObject({ state: 'hold', reason: 'stable', evidence: { units: 3 } });
		const alone = days.map((day) => ({ ...day, reader: 'A' }));
		const mixed = advise(animalHistory([bundleHistory({ days: alone })]), asking(23), {
			thresholds
		})[0];
		expect(mixed.evidence.statistic).not.toBe(advice.evidence.statistic);
	});
});

describe('gain and loss', () => {
	it('come with an advance for lost yield, the loss being the worth of its units', () => {
		const worths = [{ day: LAST, arena: 'circle', bits: 0.01, low: 0, high: 0.03 }];
		const [advice] = advise(animalHistory([fallenBundle({ worths })]), asking(LAST), {
			thresholds
		});
		expect(advice.loss).toEqual(worths[0]);
		expect(advice.gain).toMatchObject({ n: 0, seen: null });
		expect(advice.gain?.byChance.median).toBeGreaterThan(0);
		const [steady] = advise(animalHistory([bundleHistory()]), asking(11), { thresholds });
		expect([steady.gain, steady.loss]).toEqual([null, null]);
	});
});

describe('advise', () => {
	it('looks at nothing after the day asked about', () => {
		const late = fallenBundle({ days: recordedDays([...FALLEN, 9, 9, 9]) });
		const at = asking(LAST);
		expect(advise(animalHistory([late]), at, { thresholds })).toEqual(
			advise(animalHistory([fallenBundle()]), at, { thresholds })
		);
	});

	it('gives nothing for an animal without bundles', () => {
		expect(advise(animalHistory([]), asking(3), { thresholds })).toEqual([]);
	});

	it('gives identical advice for identical input, and leaves it as it was', () => {
		const animal = animalHistory(herd(3, 8));
		const before = structuredClone(animal);
		const first = advise(animal, asking(LAST), { thresholds });
		expect(advise(structuredClone(animal), asking(LAST), { thresholds })).toEqual(first);
		expect(animal).toEqual(before);
	});

	it('never says advance against its own rules, over 2000 random bundles', () => {
		const random = seeded(21, 'random histories');
		let advances = 0;
		let lowered = 0;
		let steps = 0;
		for (let round = 0; round < 500; round++) {
			const bundles = Array.from({ length: 4 }, (_, b) => randomBundle(`T0${b}`, random));
			const at = asking(20, { nextCriticalAtH: random.next() < 0.2 ? 20 * 24 + 40 : null });
			const advised = advise(animalHistory(bundles), at, { thresholds });
			let onYield = 0;
			for (const advice of advised) {
				if (advice.state !== 'advance') {
					if (advice.step !== null) steps++;
					continue;
				}
				const bundle = bundles.find((one) => one.bundle === advice.bundle) ?? bundles[0];
				expectAllowed(bundle, at, advice.step?.um ?? 0, advice.reason);
				if (advice.reason === 'lowering') lowered++;
				else onYield++;
			}
			expect(onYield).toBeLessThanOrEqual(1);
			advances += onYield;
		}
		expect(steps).toBe(0);
		// The property is worth something only if advances do occur.
		expect(advances).toBeGreaterThan(25);
		expect(lowered).toBeGreaterThan(25);
	});
});

/** A bundle in any state, more often than not one that has lost its units. */
function randomBundle(bundle: string, random: Random): BundleHistory {
	const chance = (p: number) => random.next() < p;
	const place = (): LandmarkPlace =>
		(['above', 'above', 'in', 'below', 'unclear'] as const)[random.below(5)];
	const fellOn = 8 + random.below(11);
	const days = Array.from({ length: 21 }, (_, day) =>
		recordedDay(day, day < fellOn ? 5 + random.below(3) : random.below(3), {
			isLeftOut: chance(0.05),
			setup: chance(0.02) ? 'two' : 'one'
		})
	).filter(() => chance(0.95));
	return bundleHistory({
		bundle,
		isParked: chance(0.05),
		isInLayer: chance(0.7),
		role: chance(0.9) ? 'record' : 'reference',
		depthUm: 2000 - Math.round(700 * random.next()) + 200,
		travelLeftUm: chance(0.2) ? 300 * random.next() : 2000,
		moves: chance(0.3) ? [move(20, 11 - 30 * random.next(), 20 + 100 * random.next())] : [],
		days,
		landmarks: chance(0.8) ? [landmark(20 - random.below(5), place())] : [],
		impedances: chance(0.1)
			? [{ atH: 480 - 400 * random.next(), isInBrain: chance(0.7), kohm: [10, 10, 200, 200] }]
			: []
	});
}

function expectAllowed(bundle: BundleHistory, at: Asking, um: number, reason: string): void {
	const { reserveUm, dailyLimitUm } = ADVICE_DEFAULTS;
	expect(bundle.isParked).toBe(false);
	expect(um).toBeGreaterThan(0);
	expect(bundle.travelLeftUm).toBeGreaterThanOrEqual(um + reserveUm);
	const last = bundle.moves.at(-1);
	const row = bundle.landmarks.findLast(({ atH }) => atH > (last?.atH ?? -Infinity));
	expect(row?.place).not.toBe('below');
	const isBroken = bundle.impedances.some(
		({ isInBrain, atH }) => isInBrain && at.atH - atH <= 14 * 24
	);
	expect(isBroken).toBe(false);
	if (reason === 'lowering') {
		expect(bundle.isInLayer).toBe(false);
		const today = bundle.moves.filter(({ day }) => day === at.day);
		expect(today.reduce((sum, one) => sum + one.um, um)).toBeLessThanOrEqual(dailyLimitUm);
		expect(at.atH - (last?.atH ?? -Infinity)).toBeGreaterThanOrEqual(2);
		expect(2000 - bundle.depthUm).toBeGreaterThanOrEqual(-300);
		return;
	}
	expect(reason).toBe('yield-lost');
	expect(bundle.role).toBe('record');
	expect(um).toBe(standardStep(bundle.pitchUm, ADVICE_DEFAULTS).um);
	expect(row).toMatchObject({ place: 'above' });
	expect(at.day - (row?.day ?? -Infinity)).toBeLessThan(3);
	expect(settledAtH(bundle.moves, at.atH, ADVICE_DEFAULTS)).toBeLessThanOrEqual(at.atH);
	expect(at.nextCriticalAtH).toBeNull();
	const counted = bundle.days.filter(({ isLeftOut }) => !isLeftOut);
	expect(counted.at(-1)?.units).toBeLessThanOrEqual(1);
	expect(counted.length).toBeGreaterThanOrEqual(8);
}
