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
import { advise } from './advise';
import type { AnimalHistory, Asking, BundleHistory } from './history';
import { ADVICE_DEFAULTS } from './parameters';
import { RULES } from './rules/order';

/** Fixed limits: what the rules do with them is the matter here. */
const thresholds = () => ({ watchAt: 1.5, advanceAt: 2.5 });
const LAST = FALLEN.length - 1;

const one = (bundle: BundleHistory, at: Asking, over: Partial<AnimalHistory> = {}) =>
	advise(animalHistory([bundle], over), at, { thresholds })[0];
const fallen = (over: Partial<BundleHistory> = {}, at: Partial<Asking> = {}) =>
	one(fallenBundle(over), asking(LAST, at));

/** The statistic of a hand-made history, so that limits can be put right at it. */
const statistic = fallen().evidence.statistic;

describe('rule 1, parked', () => {
	it('comes before everything a person has not said', () => {
		const parked = fallen({ isParked: true, isInLayer: false, travelLeftUm: 0 });
		expect(parked).toMatchObject({ state: 'parked', reason: 'parked', step: null });
		expect(parked.trace).toHaveLength(1);
	});
});

describe('rule 2, hardware', () => {
	const reading = (kohm: (number | null)[], over = {}) => [
		{ atH: LAST * 24, isInBrain: true, kohm, ...over }
	];

	it('holds when two of four channels are open or short', () => {
		const broken = fallen({ impedances: reading([30, 3100, 200, 180]) });
		expect(broken).toMatchObject({ state: 'hold', reason: 'check-hardware' });
		expect(fallen({ impedances: reading([30, 210, 200, 180]) }).reason).toBe('yield-lost');
	});

	it('counts 50 and 3000 kΩ as working, and channels not measured as nothing', () => {
		expect(fallen({ impedances: reading([50, 3000, 50, 3000]) }).reason).toBe('yield-lost');
		expect(fallen({ impedances: reading([null, null, null, 20]) }).reason).toBe('yield-lost');
	});

	it('holds a shank with a quarter of its channels bad', () => {
		const kohm = [10, 10, 10, 10, ...Array<number>(12).fill(600)];
		expect(fallen({ kind: 'shank', impedances: reading(kohm) }).reason).toBe('check-hardware');
		const three = [600, ...kohm.slice(1)];
		expect(fallen({ kind: 'shank', impedances: reading(three) }).reason).toBe('yield-lost');
	});

	it('reads only the latest reading from inside the brain, at most 14 days old', () => {
		const bad = [10, 10, 10, 10];
		const at = asking(LAST).atH;
		expect(fallen({ impedances: reading(bad, { isInBrain: false }) }).reason).toBe('yield-lost');
		expect(fallen({ impedances: reading(bad, { atH: at - 14 * 24 }) }).reason).toBe(
			'check-hardware'
		);
		expect(fallen({ impedances: reading(bad, { atH: at - 14 * 24 - 1 }) }).reason).toBe(
			'yield-lost'
		);
		const mended = [...reading(bad), { atH: at - 1, isInBrain: true, kohm: [200, 200, 200, 200] }];
		expect(fallen({ impedances: mended }).reason).toBe('yield-lost');
	});
});

describe('rule 3, lowering', () => {
	const lower = (toLayerUm: number, over: Partial<BundleHistory> = {}, at = asking(5)) =>
		one(
			bundleHistory({
				isInLayer: false,
				depthUm: 2000 - toLayerUm,
				days: [],
				landmarks: [landmark(4, 'above')],
				...over
			}),
			at
		);

	it('takes half turns beyond 500 µm, quarters beyond 300, eighths at the end', () => {
		expect(lower(501)).toMatchObject({ state: 'advance', reason: 'lowering' });
		expect(lower(501).step).toEqual({ um: 158.75, turns: 0.5 });
		expect(lower(500).step).toEqual({ um: 79.375, turns: 0.25 });
		expect(lower(301).step?.turns).toBe(0.25);
		expect(lower(300).step?.turns).toBe(0.125);
	});

	it('keeps the last steps to the largest the species allows', () => {
		expect(lower(200, { pitchUm: 500 }).step).toEqual({ um: 50, turns: 0.1 });
	});

	it('asks to listen within 300 µm unless there is a row since the last move', () => {
		expect(lower(300, { landmarks: [] })).toMatchObject({
			state: 'watch',
			reason: 'listen-first'
		});
		const moved = { moves: [move(4, 12, 40)], landmarks: [landmark(4, 'above')] };
		expect(lower(300, moved).reason).toBe('listen-first');
		expect(lower(301, { landmarks: [] }).state).toBe('advance');
	});

	it('wants a clear row on the last stretch, and stops when told of the layer or below it', () => {
		expect(lower(151, { landmarks: [landmark(4, 'unclear')] }).state).toBe('advance');
		expect(lower(150, { landmarks: [landmark(4, 'unclear')] }).reason).toBe('unclear-landmarks');
		expect(lower(150, { landmarks: [landmark(4, 'in')] }).reason).toBe('confirm-layer');
		expect(lower(250, { landmarks: [landmark(4, 'below')] }).reason).toBe('below-layer');
		expect(lower(-40).state).toBe('advance');
		expect(lower(-300).state).toBe('advance');
		expect(lower(-301).reason).toBe('below-layer');
	});

	it('rests two hours after a move', () => {
		const moves = [move(5, 10.01, 80)];
		expect(lower(900, { moves })).toMatchObject({
			state: 'settling',
			reason: 'settling',
			change: { by: 'time', value: 5 * 24 + 12.01 }
		});
		expect(lower(900, { moves: [move(5, 10, 20)] }).state).toBe('advance');
	});

	it('adds up all travel of the day, back and forth, and stops at the daily limit', () => {
		const moves = [move(5, 6, 120), move(5, 8, -40)];
		// 160 of 200 µm are used: an eighth (39.7 µm) still fits, a quarter does not.
		expect(lower(900, { moves }).step).toEqual({ um: 39.6875, turns: 0.125 });
		expect(lower(900, { moves: [...moves, move(5, 9, 1)] })).toMatchObject({
			state: 'settling',
			reason: 'daily-limit'
		});
		expect(lower(900, { moves: [move(4, 9, 200)] }).step?.turns).toBe(0.5);
	});

	it('says no travel when the step would touch the reserve', () => {
		expect(lower(900, { travelLeftUm: 258.75 }).state).toBe('advance');
		expect(lower(900, { travelLeftUm: 258.7 }).state).toBe('no-travel');
	});

	it('waits for a person when nobody said where the layer is', () => {
		expect(lower(900, { layerDepthUm: null })).toMatchObject({ reason: 'layer-unknown' });
	});

	it('ends when a person confirms the layer, whatever the depth says', () => {
		expect(lower(900, { isInLayer: true }).state).toBe('too-few-days');
	});

	it('also guides bundles of other roles, which get no advice once in place', () => {
		expect(lower(900, { role: 'reference' }).state).toBe('advance');
		expect(lower(900, { role: 'reference', isInLayer: true })).toBeUndefined();
		expect(one(fallenBundle({ role: 'field potential' }), asking(LAST))).toBeUndefined();
	});
});

describe('rule 4, settling', () => {
	it('rests 24 hours after a move, 12 after one of at most 40 µm, either way', () => {
		const at = asking(LAST).atH;
		const moved = (hoursAgo: number, um: number) =>
			fallen({ moves: [{ day: LAST, atH: at - hoursAgo, um }] });
		expect(moved(23.9, 41)).toMatchObject({ state: 'settling', change: { by: 'time' } });
		expect(moved(24, 41).state).toBe('too-few-days');
		expect(moved(11.9, -40).state).toBe('settling');
		expect(moved(12, -40).state).toBe('too-few-days');
	});

	it('still waits for a large move when a small one followed', () => {
		const at = asking(LAST).atH;
		const moves = [
			{ day: LAST - 1, atH: at - 20, um: 160 },
			{ day: LAST, atH: at - 13, um: 40 }
		];
		expect(fallen({ moves })).toMatchObject({ state: 'settling', change: { value: at + 4 } });
	});
});

describe('rule 5, too few days', () => {
	it('needs five days since the bundle came to rest', () => {
		const days = recordedDays(STEADY);
		expect(one(bundleHistory({ days: days.slice(0, 4) }), asking(4))).toMatchObject({
			state: 'too-few-days',
			change: { by: 'tallies', value: 1 }
		});
		expect(one(bundleHistory({ days: days.slice(0, 5) }), asking(4)).state).toBe('hold');
	});

	it('needs two of them within the last five', () => {
		const bundle = bundleHistory();
		expect(one(bundle, asking(14)).state).toBe('hold');
		expect(one(bundle, asking(15)).state).toBe('too-few-days');
	});

	it('does not count days before a move, while it settled, or left out', () => {
		const moved = bundleHistory({ moves: [move(6, 12, 40)] });
		// The count of day 7 comes 22 h after the move.
		expect(one(moved, asking(11))).toMatchObject({ state: 'hold', evidence: { tallies: 5 } });
		const large = bundleHistory({ moves: [move(6, 12, 160)] });
		expect(one(large, asking(11))).toMatchObject({
			state: 'too-few-days',
			evidence: { tallies: 4 }
		});
		const days = recordedDays(STEADY).map((day) => ({ ...day, isLeftOut: day.day < 8 }));
		expect(one(bundleHistory({ days }), asking(11)).state).toBe('too-few-days');
	});

	it('does not count what was made with another setup, or by another person', () => {
		const other = (over: object) =>
			bundleHistory({
				days: STEADY.map((n, day) => recordedDay(day, n, day < 8 ? {} : over))
			});
		expect(one(other({ setup: 'two' }), asking(11)).evidence.tallies).toBe(4);
		// Of the last five days the other person counted four.
		expect(one(other({ reader: 'B' }), asking(11)).evidence.tallies).toBe(4);
		expect(one(other({ reader: 'A' }), asking(11)).evidence.tallies).toBe(12);
	});

	it('gives no advance with five to seven days', () => {
		const days = recordedDays([8, 9, 8, 9, 8, 0, 0]);
		const bundle = bundleHistory({ days, landmarks: [landmark(6, 'above')] });
		const low = { thresholds: () => ({ watchAt: 0.5, advanceAt: 1 }) };
		const [seven] = advise(animalHistory([bundle]), asking(6), low);
		expect(seven).toMatchObject({ state: 'watch', reason: 'early-sign', evidence: { tallies: 7 } });
		const eighth = { ...bundle, days: [...days, recordedDay(7, 0)] };
		expect(advise(animalHistory([eighth]), asking(7), low)[0].state).toBe('advance');
	});
});

describe('rule 6, common cause', () => {
	const herd = (lost: number, of: number, over: Partial<AnimalHistory> = {}) => {
		const bundles = Array.from({ length: of }, (_, b) =>
			bundleHistory({
				bundle: `T0${b + 1}`,
				days: recordedDays([...STEADY, b < lost ? 0 : 6])
			})
		);
		return advise(animalHistory(bundles, over), asking(12), { thresholds });
	};

	it('holds all when 40 % of the bundles able to show a fall did', () => {
		expect(herd(2, 5).every(({ reason }) => reason === 'common-cause')).toBe(true);
		expect(herd(1, 5).some(({ reason }) => reason === 'common-cause')).toBe(false);
	});

	it('cannot tell from fewer than four', () => {
		const three = herd(3, 3);
		expect(three[0].evidence.commonShare).toBeNull();
		expect(three[0].trace[5]).toMatchObject({ inputs: { canTell: false }, hasFired: false });
		expect(herd(4, 4)[0].trace[5]).toMatchObject({ inputs: { canTell: true }, hasFired: true });
	});

	it('does not count bundles too small to show a fall', () => {
		const small = Array.from({ length: 6 }, (_, b) =>
			bundleHistory({ bundle: `T0${b}`, days: recordedDays([2, 1, 2, 2, 1, 2, 2, 1, 0]) })
		);
		const [advice] = advise(animalHistory(small), asking(8), { thresholds });
		expect(advice.evidence.commonShare).toBeNull();
	});

	it('adds nothing to the statistic, nor teaches, nor counts as a day', () => {
		const [first] = herd(5, 5);
		const before = one(bundleHistory(), asking(11));
		expect(first.evidence.statistic).toBe(before.evidence.statistic);
		expect(first.evidence.model).toEqual(before.evidence.model);
		expect(first.evidence.units).toBe(6);
		expect(first.evidence.tallies).toBe(12);
	});

	it('looks across animals that shared the rig', () => {
		const neighbours = [{ day: 12, able: 10, fell: 8 }];
		expect(herd(1, 3, { neighbours }).every(({ reason }) => reason === 'common-cause')).toBe(true);
		expect(herd(1, 3, { neighbours: [{ day: 11, able: 10, fell: 8 }] })[0].reason).not.toBe(
			'common-cause'
		);
	});
});

describe('rule 7, yield lost', () => {
	it('advises one standard step when the tip is heard above the layer', () => {
		expect(fallen()).toMatchObject({
			state: 'advance',
			reason: 'yield-lost',
			step: { um: 39.6875, turns: 0.125 }
		});
	});

	it('keeps the standard step within 30 to 50 µm', () => {
		expect(fallen({ pitchUm: 150 }).step).toEqual({ um: 30, turns: 0.2 });
		expect(fallen({ pitchUm: 500 }).step).toEqual({ um: 50, turns: 0.1 });
	});

	it('fires at its limit, not below', () => {
		const at = (advanceAt: number) =>
			advise(animalHistory([fallenBundle()]), asking(LAST), {
				thresholds: () => ({ watchAt: 1, advanceAt })
			})[0];
		expect(at(statistic).state).toBe('advance');
		expect(at(statistic + 1e-9)).toMatchObject({ state: 'watch', reason: 'early-sign' });
	});

	it('needs little left: one unit at most, or a worth surely below the least', () => {
		const days = recordedDays([...STEADY, 3, 2, 2, 2, 2]);
		const worth = (day: number, high: number) => [
			{ day, arena: 'circle', bits: high - 0.01, low: high - 0.02, high }
		];
		const two = (worths: BundleHistory['worths']) =>
			one(fallenBundle({ days, worths, landmarks: [landmark(16, 'above')] }), asking(16));
		expect(two([])).toMatchObject({ state: 'watch', reason: 'losing-cells-still-useful' });
		expect(two(worth(16, 0.0199)).state).toBe('advance');
		expect(two(worth(16, 0.02)).reason).toBe('losing-cells-still-useful');
		expect(two(worth(11, 0.0199)).reason).toBe('losing-cells-still-useful');
	});

	it('does not move on landmarks that say below, say nothing clear, or are old', () => {
		const at = (...landmarks: BundleHistory['landmarks']) => fallen({ landmarks });
		expect(at()).toMatchObject({ state: 'watch', reason: 'listen-first' });
		expect(at(landmark(LAST, 'below'))).toMatchObject({ state: 'watch', reason: 'below-layer' });
		expect(at(landmark(LAST, 'in')).reason).toBe('unclear-landmarks');
		expect(at(landmark(LAST, 'unclear')).reason).toBe('unclear-landmarks');
		expect(at(landmark(LAST - 2, 'above')).state).toBe('advance');
		expect(at(landmark(LAST - 3, 'above')).reason).toBe('listen-first');
		expect(at(landmark(LAST - 1, 'above'), landmark(LAST, 'below')).reason).toBe('below-layer');
	});

	it('says no travel before it looks at the calendar', () => {
		const critical = { nextCriticalAtH: asking(LAST).atH + 1 };
		expect(fallen({ travelLeftUm: 139.6 }, critical)).toMatchObject({
			state: 'no-travel',
			reason: 'no-travel',
			step: null
		});
		expect(fallen({ travelLeftUm: 139.6875 }).state).toBe('advance');
	});

	it('is postponed by a critical session within 48 hours, until it is over', () => {
		const at = asking(LAST).atH;
		expect(fallen({}, { nextCriticalAtH: at + 48 })).toMatchObject({
			state: 'watch',
			reason: 'postponed',
			change: { by: 'time', value: at + 48 }
		});
		expect(fallen({}, { nextCriticalAtH: at + 48.1 }).state).toBe('advance');
		expect(fallen({}, { nextCriticalAtH: at - 1 }).state).toBe('advance');
	});
});

describe('rule 8, still useful', () => {
	it('watches a bundle that has lost much but still helps', () => {
		const days = recordedDays([...STEADY, 3, 2, 2, 2, 2]);
		const useful = one(bundleHistory({ days }), asking(16));
		expect(useful).toMatchObject({ state: 'watch', reason: 'losing-cells-still-useful' });
		expect(useful.step).toBeNull();
	});
});

describe('rule 9, early sign', () => {
	it('fires at the watch limit, not below', () => {
		const days = recordedDays([...STEADY, 3]);
		const s = one(bundleHistory({ days }), asking(12)).evidence.statistic;
		const at = (watchAt: number) =>
			advise(animalHistory([bundleHistory({ days })]), asking(12), {
				thresholds: () => ({ watchAt, advanceAt: 50 })
			})[0];
		expect(at(s)).toMatchObject({ state: 'watch', reason: 'early-sign' });
		expect(at(s + 1e-9)).toMatchObject({ state: 'hold', reason: 'stable' });
	});

	it('fires when the share of units passing quality fell by half', () => {
		const judged = (lately: number) =>
			one(
				bundleHistory({
					days: STEADY.map((n, day) => recordedDay(day, n, { passing: day < 9 ? n : lately }))
				}),
				asking(11)
			);
		// Lately 3 days of 6 units: 9 of 18 is half of all.
		expect(judged(3).reason).toBe('early-sign');
		expect(judged(4).reason).toBe('stable');
	});

	it('fires for the bundle whose worth fell most when decoding has become worse', () => {
		const worth = (day: number, bits: number) => ({
			day,
			arena: 'circle',
			bits,
			low: bits,
			high: bits
		});
		const bundles = [
			bundleHistory({ bundle: 'T01', worths: [worth(5, 0.2), worth(11, 0.15)] }),
			bundleHistory({ bundle: 'T02', worths: [worth(5, 0.3), worth(11, 0.1)] })
		];
		const reasons = (hasDecodingAlarm: boolean) =>
			advise(animalHistory(bundles, { hasDecodingAlarm }), asking(11), { thresholds }).map(
				({ reason }) => reason
			);
		expect(reasons(true)).toEqual(['stable', 'early-sign']);
		expect(reasons(false)).toEqual(['stable', 'stable']);
	});
});

describe('rule 10, stable', () => {
	it('holds, and says what the statistic would have to reach', () => {
		const stable = one(bundleHistory(), asking(11));
		expect(stable).toMatchObject({
			state: 'hold',
			reason: 'stable',
			change: { by: 'statistic', value: 1.5 }
		});
		expect(stable.trace.map(({ rule }) => rule)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
	});
});

describe('order of the rules', () => {
	it('is 1 to 10, and the trace ends with the first that fires', () => {
		expect(RULES.map(({ number }) => number)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
		const { trace } = fallen();
		expect(trace.slice(0, 7).map(({ hasFired }) => hasFired)).toEqual([
			...Array<boolean>(6).fill(false),
			true
		]);
		expect(trace[6].inputs).toMatchObject({
			statistic,
			advanceAt: 2.5,
			units: 1,
			landmark: 'above'
		});
	});

	it('lets every rule win over all that come after it', () => {
		const at = asking(LAST);
		const impedances = [{ atH: at.atH, isInBrain: true, kohm: [1, 1, 1, 1] }];
		const settling = [{ day: LAST, atH: at.atH - 1, um: 160 }];
		const all = { isParked: true, impedances, isInLayer: false, moves: settling };
		const reasons = [
			fallen(all),
			fallen({ ...all, isParked: false }),
			fallen({ ...all, isParked: false, impedances: [] }),
			fallen({ moves: settling })
		].map(({ trace }) => trace[trace.length - 1].rule);
		expect(reasons).toEqual([1, 2, 3, 4]);
	});

	it('puts few days before a common cause, and that before lost yield', () => {
		const herd = Array.from({ length: 5 }, (_, b) =>
			fallenBundle({
				bundle: `T0${b}`,
				days: recordedDays(b === 4 ? FALLEN : [...STEADY, 6, 6, 6, 0])
			})
		);
		const young = bundleHistory({ bundle: 'T09', days: [recordedDay(LAST, 3)] });
		const advice = advise(animalHistory([...herd, young]), asking(LAST), { thresholds });
		expect(advice.map(({ reason }) => reason)).toEqual([
			...Array<string>(5).fill('common-cause'),
			'too-few-days'
		]);
		expect(advice[4].evidence.statistic).toBeGreaterThan(2.5);
	});
});

describe('provisional advice', () => {
	it('is what rests on counts by eye', () => {
		const days = STEADY.map((n, day) => recordedDay(day, n, { isByEye: true }));
		expect(one(bundleHistory({ days }), asking(11)).isProvisional).toBe(true);
		expect(one(bundleHistory(), asking(11)).isProvisional).toBe(false);
		expect(one(bundleHistory({ days, isParked: true }), asking(11)).isProvisional).toBe(false);
	});
});

it('has defaults that a lab may read', () => {
	expect(ADVICE_DEFAULTS).toMatchObject({ watchRunDays: 60, advanceRunDays: 500, dayShare: 0.25 });
});
