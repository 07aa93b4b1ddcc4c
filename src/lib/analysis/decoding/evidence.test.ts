import { describe, expect, it } from 'vitest';
import { modelOf, sparse } from '../../../../tests/factories/decoding';
import { worstDifference } from '../../../../tests/factories/reference';
import { drawPoisson } from '../random/poisson-draw';
import { seeded, type Random } from '../random/seeded';
import { contradictions } from './contradictions';
import { disagreementScale } from './disagreement';
import { evidenceRows } from './evidence-rows';
import { opposedUnits } from './opposed-units';
import { simulatedDisagreement } from './simulated-disagreement';
import { spikesOfWindow } from './spikes-of-window';
import { unitEvidence } from './unit-evidence';
import { unitLosses } from './unit-losses';

const PLACES = 40;
const TAU_S = 0.25;

/** Bell-shaped fields all over a line of 40 places. */
function fields(units: number, random: Random): number[][] {
	return Array.from({ length: units }, () => {
		const [centre, peak] = [PLACES * random.next(), 4 + 14 * random.next()];
		const [width, base] = [2 + 3 * random.next(), 0.1 + 0.4 * random.next()];
		return Array.from(
			{ length: PLACES },
			(_, k) => base + peak * Math.exp(-(((k - centre) / width) ** 2) / 2)
		);
	});
}
const even = Array<number>(PLACES).fill(1);
const drawnAt = (rates: number[][], place: number, random: Random) =>
	rates.map((row) => drawPoisson(row[place] * TAU_S, random));

describe('unitEvidence', () => {
	it('weighs spikes and silence of each unit against its mean over places (hand-worked)', () => {
		const model = modelOf(
			[
				[8, 2],
				[1, 5]
			],
			[1, 1]
		);
		// One spike: ln 8 − 2 against ln 2 − 0.5, half the difference is (ln 4 − 1.5)/2.
		// None: −0.25 against −1.25, half of it is 0.5.
		const bits = unitEvidence(model, [1, 0], TAU_S, 0);
		expect(bits[0]).toBeCloseTo((Math.log(4) - 1.5) / 2 / Math.LN2, 14);
		expect(bits[1]).toBeCloseTo(0.5 / Math.LN2, 14);
		expect(
			worstDifference(unitEvidence(model, [1, 0], TAU_S, 1), [-bits[0], -bits[1]])
		).toBeLessThan(1e-14);
	});

	it('sums over units to the joint evidence relative to its mean, and over places to nothing', () => {
		const random = seeded(3);
		const rates = fields(12, random);
		const model = modelOf(rates, even);
		const counts = drawnAt(rates, 17, random);
		const [joint] = [evidenceRows(model, sparse([counts]), TAU_S, 0, 1)];
		const mean = joint.reduce((a, b) => a + b, 0) / PLACES;
		const all = Array.from({ length: PLACES }, (_, p) => unitEvidence(model, counts, TAU_S, p));
		all.forEach((bits, p) => {
			const sum = bits.reduce((a, b) => a + b, 0);
			expect(sum).toBeCloseTo((joint[p] - mean) * Math.LOG2E, 10);
		});
		for (let u = 0; u < 12; u++) {
			expect(all.reduce((sum, bits) => sum + bits[u], 0)).toBeCloseTo(0, 9);
		}
	});

	it('is undefined at a place that cannot be answered, and refuses another number of units', () => {
		const model = modelOf([[8, 2]], [1, 1]);
		expect(unitEvidence(model, [1], TAU_S, -1)[0]).toBeNaN();
		expect(() => unitEvidence(model, [1, 0], TAU_S, 0)).toThrow(RangeError);
	});
});

describe('spikesOfWindow', () => {
	it('writes the counts of one window out, zeros included', () => {
		const counts = sparse([
			[1, 0, 2],
			[0, 0, 3]
		]);
		expect([...spikesOfWindow(counts, 0, 3)]).toEqual([1, 0, 2]);
		expect([...spikesOfWindow(counts, 1, 3)]).toEqual([0, 0, 3]);
	});
});

describe('disagreement of units', () => {
	it('is what sharing one place costs (hand-worked)', () => {
		const model = modelOf(
			[
				[10, 1],
				[1, 10]
			],
			[1, 1]
		);
		const scale = disagreementScale(model, TAU_S);
		const of = (n: number[]) => {
			const { unit, spikes, first } = sparse([n]);
			return scale.of(unit, spikes, first[0], first[1]);
		};
		// Both fire once: each would have ln 10 − 2.5 at its own place, together ln 10 − 2.75.
		const both = of([1, 1]);
		expect(both.dropNats).toBeCloseTo(2 * (Math.log(10) - 2.5) - (Math.log(10) - 2.75), 12);
		expect(both.place).toBe(0);
		// Only one fires: its best place and the silent one's are the same.
		expect(of([1, 0])).toEqual({ dropNats: 0, place: 0 });
		expect(of([0, 7]).dropNats).toBe(0);
		expect(of([0, 0]).dropNats).toBeCloseTo(2.25, 12);
	});

	it('is the sum of what each unit loses', () => {
		const random = seeded(5);
		const rates = fields(9, random);
		const model = modelOf(rates, even);
		const scale = disagreementScale(model, TAU_S);
		for (let round = 0; round < 40; round++) {
			const counts = drawnAt(rates, random.below(PLACES), random);
			const { unit, spikes, first } = sparse([counts]);
			const { dropNats, place } = scale.of(unit, spikes, 0, first[1]);
			const losses = unitLosses(model, scale, counts, TAU_S, place);
			expect(losses.reduce((a, b) => a + b, 0)).toBeCloseTo(dropNats, 9);
			expect(losses.every((loss) => loss > -1e-12)).toBe(true);
		}
		expect(() => unitLosses(model, scale, [1], TAU_S, 0)).toThrow(RangeError);
	});

	it('is none for one unit, however it fires', () => {
		const model = modelOf(fields(1, seeded(2)), even);
		const scale = disagreementScale(model, TAU_S);
		for (const n of [0, 1, 90]) {
			expect(scale.of(Int32Array.of(0), Float64Array.of(n), 0, n > 0 ? 1 : 0).dropNats).toBeCloseTo(
				0,
				14
			);
		}
	});

	it('is drawn as if every unit were drawn by itself', () => {
		const rates = fields(10, seeded(1));
		const model = modelOf(rates, even);
		const scale = disagreementScale(model, TAU_S);
		const dealt = simulatedDisagreement(model, scale, TAU_S, 11, 4000, seeded(2));
		const random = seeded(3);
		const one = Array.from({ length: 4000 }, () => {
			const { unit, spikes, first } = sparse([drawnAt(rates, 11, random)]);
			return scale.of(unit, spikes, 0, first[1]).dropNats;
		});
		const mean = one.reduce((a, b) => a + b, 0) / 4000;
		// Four standard errors of a difference of two means of 4000.
		expect(Math.abs(dealt.meanNats - mean)).toBeLessThan(4 * dealt.sdNats * Math.sqrt(2 / 4000));
		expect(() => simulatedDisagreement(model, scale, TAU_S, 0, 1, random)).toThrow(RangeError);
	});
});

describe('contradictions', () => {
	const WINDOWS = 3000;
	const all = Int32Array.from({ length: WINDOWS }, (_, w) => w);
	const rates = fields(24, seeded(21));
	const model = modelOf(rates, even);
	const share = (found: readonly { p: number }[], level: number) =>
		found.filter(({ p }) => p <= level).length / found.length;

	it('have a p that is as often below a level as the level says, when the model is right', () => {
		const random = seeded(22);
		const windows = Array.from(all, () => drawnAt(rates, random.below(PLACES), random));
		const found = contradictions(model, sparse(windows), TAU_S, all, seeded(23), 999);
		for (const level of [0.5, 0.1, 0.05, 0.01]) {
			const slack = 4 * Math.sqrt((level * (1 - level)) / WINDOWS) + 0.1 * level;
			expect(Math.abs(share(found, level) - level)).toBeLessThan(slack);
		}
		expect(found.every(({ p }) => p >= 1 / 1000 && p <= 1)).toBe(true);
	});

	it('are found where half the units speak of another place', () => {
		const random = seeded(24);
		const few = all.subarray(0, 600);
		const windows = Array.from(few, () => {
			const here = random.below(PLACES);
			const [a, b] = [here, (here + PLACES / 2) % PLACES].map((x) => drawnAt(rates, x, random));
			return a.map((n, u) => (u % 2 ? n : b[u]));
		});
		const found = contradictions(model, sparse(windows), TAU_S, few, seeded(23), 999);
		expect(share(found, 0.01)).toBeGreaterThan(0.5);
		const z = found.map((one) => one.z).sort((a, b) => a - b);
		expect(z[300]).toBeGreaterThan(2);
	});

	it('do not depend on the order in which windows are asked for', () => {
		const random = seeded(25);
		const windows = Array.from({ length: 50 }, () => drawnAt(rates, random.below(PLACES), random));
		const counts = sparse(windows);
		const asked = all.subarray(0, 50);
		const forward = contradictions(model, counts, TAU_S, asked, seeded(1), 99);
		const back = contradictions(model, counts, TAU_S, asked.slice().reverse(), seeded(1), 99);
		expect(back.reverse()).toEqual(forward);
	});
});

describe('opposedUnits', () => {
	it('names the two that fired and share least (hand-worked)', () => {
		const model = modelOf(
			[
				[9, 1, 1],
				[8, 2, 1],
				[1, 1, 9],
				[1, 30, 1]
			],
			[1, 1, 1]
		);
		const found = opposedUnits(model, [2, 1, 2, 0], TAU_S);
		expect(found).toMatchObject({ unitA: 0, unitB: 2, binA: 0, binB: 2 });
		// The posterior of unit 0 is ∝ (81 e^(−9/4), e^(−1/4), e^(−1/4)), of unit 2 the same backwards.
		const weights = [81 * Math.exp(-2.25), Math.exp(-0.25), Math.exp(-0.25)];
		const total = weights.reduce((a, b) => a + b, 0);
		expect(found?.overlap).toBeCloseTo((3 * weights[1]) / total, 12);
	});

	it('needs two units that fired, and as many counts as units', () => {
		const model = modelOf(
			[
				[9, 1],
				[1, 9]
			],
			[1, 1]
		);
		expect(opposedUnits(model, [4, 0], TAU_S)).toBeNull();
		expect(() => opposedUnits(model, [4], TAU_S)).toThrow(RangeError);
	});
});
