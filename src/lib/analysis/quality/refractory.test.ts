import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { contamination, contaminationLimit } from './contamination';
import { presenceRatio } from './presence-ratio';
import { refractoryViolations } from './refractory-violations';

interface Counted {
	N: number;
	T: number;
	violations: number;
	refractoryS: number;
	censoredS: number;
}
interface Shares {
	q: number;
	singleContaminant: number | null;
	manyContaminants: number | null;
}
const counted = (spikes: number, durationS: number, violations: number, deadTimeS = 0) => ({
	spikes,
	durationS,
	violations,
	refractoryS: 0.002,
	deadTimeS
});

describe('refractoryViolations', () => {
	it('counts every pair closer than the refractory period, and intervals apart (by hand)', () => {
		// Gaps of 1, 0.5 and 1 ms: three short intervals, and the first and third are a pair too.
		const times = Float64Array.of(0, 1, 1.001, 1.0015, 1.0025, 2);
		expect(refractoryViolations(times)).toEqual({
			pairs: 5,
			shortIntervals: 3,
			shareOfIntervals: 3 / 5
		});
	});

	it('takes an interval of just the refractory period as none, and equal times as one', () => {
		expect(refractoryViolations(Float64Array.of(0, 0.25, 0.5), 0.25).pairs).toBe(0);
		expect(refractoryViolations(Float64Array.of(3, 3)).pairs).toBe(1);
	});

	it('equals numpy on listed spikes', () => {
		const { input, expected } = referenceCase<
			{ spikeTimes: number[]; T: number; binS: number; refractoryS: number },
			{ presenceRatio: number; isiViolations: number; isiViolationFraction: number }
		>('12_unit_quality.json', 'presence_ratio_and_isi');
		const times = Float64Array.from(input.spikeTimes);
		const got = refractoryViolations(times, input.refractoryS);
		expect(got.shortIntervals).toBe(expected.isiViolations);
		expect(got.shareOfIntervals).toBeCloseTo(expected.isiViolationFraction, 12);
		expect(presenceRatio(times, 0, input.T, input.binS)).toBeCloseTo(expected.presenceRatio, 12);
	});

	it('has no share with fewer than two spikes, and refuses times that go back', () => {
		expect(refractoryViolations(new Float64Array(0)).shareOfIntervals).toBeNaN();
		expect(refractoryViolations(Float64Array.of(1)).shareOfIntervals).toBeNaN();
		expect(() => refractoryViolations(Float64Array.of(2, 1))).toThrow(RangeError);
		expect(() => refractoryViolations(Float64Array.of(1, 2), 0)).toThrow(RangeError);
	});

	it('finds as many pairs as comparing all with all', () => {
		const random = seeded(3);
		const times = Float64Array.from({ length: 400 }, () => random.next()).sort();
		let pairs = 0;
		for (let i = 0; i < 400; i++)
			for (let j = 0; j < i; j++) if (times[i] - times[j] < 0.01) pairs++;
		expect(refractoryViolations(times, 0.01).pairs).toBe(pairs);
	});
});

describe('contamination', () => {
	it('is 0.184 by one foreign unit and 0.163 by many for 12 violations (closed form)', () => {
		const got = contamination(counted(6000, 1800, 12));
		expect(got.q).toBeCloseTo(0.3, 12);
		expect(got.oneUnit).toBeCloseTo(0.183772233983, 11);
		expect(got.manyUnits).toBeCloseTo(0.163339973466, 11);
	});

	it('equals the closed forms of every listed case, undefined where they have no root', () => {
		const { input, expected } = referenceCase<Counted[], Shares[]>(
			'12_unit_quality.json',
			'refractory_contamination'
		);
		input.forEach((row, i) => {
			const got = contamination({
				spikes: row.N,
				durationS: row.T,
				violations: row.violations,
				refractoryS: row.refractoryS,
				deadTimeS: row.censoredS
			});
			expect(got.q).toBeCloseTo(expected[i].q, 10);
			const { singleContaminant, manyContaminants } = expected[i];
			expect(
				worstDifference([got.oneUnit, got.manyUnits], [singleContaminant, manyContaminants])
			).toBeLessThan(1e-10);
		});
		expect(expected.some((row) => row.singleContaminant === null)).toBe(true);
	});

	it('finds the true share of simulated trains by the form made for them', () => {
		const { expected } = referenceCase<
			unknown,
			(Shares & { kind: string; trueFraction: number; pairViolations: number } & Counted)[]
		>('12_unit_quality.json', 'refractory_simulation');
		for (const row of expected) {
			const got = contamination(counted(row.N, row.T, row.pairViolations));
			expect(got.oneUnit).toBeCloseTo(row.singleContaminant ?? NaN, 10);
			expect(got.manyUnits).toBeCloseTo(row.manyContaminants ?? NaN, 10);
			const share = row.kind === 'single' ? got.oneUnit : got.manyUnits;
			// The count has a Poisson error of 1/√75 to 1/√283, which C shares.
			expect(Math.abs(share - row.trueFraction)).toBeLessThan(0.04);
		}
	});

	it('has no upper limit for 900 spikes in 1800 s without a violation, and one for 9000', () => {
		const short = contaminationLimit(counted(900, 1800, 0));
		expect(short?.manyUnits).toBeNaN();
		expect(short?.oneUnit).toBeNaN();
		const long = contaminationLimit(counted(9000, 1800, 0));
		expect(long?.q).toBeCloseTo((2.995732273553991 * 1800) / (9000 * 9000 * 0.002), 12);
		const share = long?.manyUnits ?? NaN;
		expect(2 * share - share * share).toBeCloseTo(long?.q ?? NaN, 12);
		expect(contaminationLimit(counted(900, 1800, 1))).toBeNull();
	});

	it('is undefined without spikes, and refuses impossible counts', () => {
		expect(contamination(counted(0, 1800, 0)).q).toBeNaN();
		expect(() => contamination(counted(10, 0, 0))).toThrow(RangeError);
		expect(() => contamination(counted(10, 1800, 0, 0.002))).toThrow(RangeError);
		expect(() => contamination(counted(10, 1800, -1))).toThrow(RangeError);
	});

	it('grows with every violation, and the form of one unit is never the smaller', () => {
		let before = -1;
		for (let n = 0; n <= 20; n++) {
			const { oneUnit, manyUnits } = contamination(counted(6000, 1800, n));
			expect(oneUnit).toBeGreaterThan(before);
			expect(oneUnit).toBeGreaterThanOrEqual(manyUnits);
			before = oneUnit;
		}
	});
});

describe('presenceRatio', () => {
	it('leaves out a last bin that is cut short, and spikes outside (by hand)', () => {
		const times = Float64Array.of(-5, 10, 70, 75, 185);
		expect(presenceRatio(times, 0, 190, 60)).toBe(2 / 3);
		expect(presenceRatio(times, 0, 59, 60)).toBeNaN();
		expect(() => presenceRatio(times, 0, 60, 0)).toThrow(RangeError);
	});
});
