import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { momentsOf, type Features } from './covariance';
import { isolation } from './isolation';
import { mahalanobis } from './mahalanobis';

type Rows = readonly (readonly number[])[];
const featuresOf = (rows: Rows): Features => ({
	values: Float64Array.from(rows.flat()),
	dimensions: rows[0].length
});
const widened = (rows: Rows, more: (row: readonly number[]) => number[]) =>
	featuresOf(rows.map((row) => [...row, ...more(row)]));

interface Told {
	dof: number;
	sortedNoiseD2: number[];
	isolationDistance: number | null;
	L: number;
	Lratio: number;
}
const listed = (id: string) =>
	referenceCase<{ cluster: number[][]; noise: number[][] }, Told>('12_unit_quality.json', id);

describe('isolation', () => {
	it.each(['isolation_tiny_2d', 'isolation_8d'])(
		'equals scipy mahalanobis and chi2.sf in %s',
		(id) => {
			const { input, expected, tol } = listed(id);
			const cluster = featuresOf(input.cluster);
			const noise = featuresOf(input.noise);
			const got = isolation(cluster, noise);
			expect(got.dimensionsUsed).toBe(expected.dof);
			expect(Math.abs(got.distance - (expected.isolationDistance ?? NaN))).toBeLessThan(tol);
			expect(Math.abs(got.lRatio - expected.Lratio)).toBeLessThan(tol);
			expect(Math.abs(got.lRatio * input.cluster.length - expected.L)).toBeLessThan(tol * 10);
			const all = [...Array(expected.dof).keys()];
			const squared = mahalanobis(cluster, noise, all)?.sort().slice(0, 50) ?? [];
			expect(worstDifference(squared, expected.sortedNoiseD2)).toBeLessThan(1e-7);
		}
	);

	it('is 175/6 in the plane, with covariance diag(0.8, 22/15) (by hand)', () => {
		const { input } = listed('isolation_tiny_2d');
		const moments = momentsOf([featuresOf(input.cluster)], 2);
		expect(worstDifference(moments.mean, [1, 4 / 3])).toBeLessThan(1e-12);
		expect(worstDifference(moments.covariance, [0.8, 0, 0, 22 / 15])).toBeLessThan(1e-12);
		const got = isolation(featuresOf(input.cluster), featuresOf(input.noise));
		expect(got.distance).toBeCloseTo(175 / 6, 12);
		expect(got.lRatio).toBeCloseTo(0.006556986195, 11);
	});

	it('has no distance with fewer spikes outside than inside, but an L-ratio', () => {
		const { input } = listed('isolation_8d');
		const { expected } = listed('isolation_undefined_when_noise_smaller');
		const few = input.noise.slice(0, input.cluster.length - 5);
		const got = isolation(featuresOf(input.cluster), featuresOf(few));
		expect(got.distance).toBeNaN();
		expect(got.undefinedBecause).toBe('fewer-outside');
		expect(got.lRatio).toBeCloseTo(expected.Lratio, 8);
	});

	it('survives a dead wire and one wired twice, gives the figures of the rest and tells', () => {
		const { input, expected } = listed('isolation_8d');
		const more = (row: readonly number[]) => [7.25, 2 * row[3] - row[0] + 1];
		const got = isolation(widened(input.cluster, more), widened(input.noise, more));
		expect(got.deadDimensions).toEqual([8, 9]);
		expect(got.dimensionsUsed).toBe(8);
		expect(got.distance).toBeCloseTo(expected.isolationDistance ?? NaN, 7);
		expect(got.lRatio).toBeCloseTo(expected.Lratio, 8);
	});

	it('is undefined where the cluster alone is flat, or has no more spikes than dimensions', () => {
		const { input } = listed('isolation_8d');
		const flat = isolation(
			widened(input.cluster, () => [0]),
			widened(input.noise, (row) => [row[0] * row[0]])
		);
		expect(flat).toMatchObject({ distance: NaN, lRatio: NaN, undefinedBecause: 'singular' });
		expect(flat.deadDimensions).toEqual([]);
		const few = isolation(featuresOf(input.cluster.slice(0, 8)), featuresOf(input.noise));
		expect(few).toMatchObject({ distance: NaN, undefinedBecause: 'too-few-spikes' });
		const one = isolation(featuresOf(input.cluster.slice(0, 1)), featuresOf(input.noise));
		expect(one.undefinedBecause).toBe('too-few-spikes');
	});

	it('says nothing when there is nothing outside, or every wire is dead', () => {
		const { input } = listed('isolation_tiny_2d');
		const none = { values: new Float64Array(0), dimensions: 2 };
		expect(isolation(featuresOf(input.cluster), none)).toMatchObject({
			lRatio: NaN,
			undefinedBecause: 'none-outside'
		});
		const dead = { values: new Float64Array(20), dimensions: 2 };
		expect(isolation(dead, dead)).toMatchObject({ distance: NaN, deadDimensions: [0, 1] });
	});

	it('does not depend on the order of spikes or the units of a feature, nor change its input', () => {
		const { input, expected } = listed('isolation_8d');
		const random = seeded(4);
		const scale = input.cluster[0].map(() => Math.exp(12 * random.next() - 6));
		const change = (rows: Rows) =>
			featuresOf(rows.map((row) => row.map((v, d) => v * scale[d] + 100 * d)).reverse());
		const noise = change(input.noise);
		const kept = noise.values.slice();
		const got = isolation(change(input.cluster), noise);
		expect(got.distance).toBeCloseTo(expected.isolationDistance ?? NaN, 6);
		expect(got.lRatio).toBeCloseTo(expected.Lratio, 8);
		expect(noise.values).toEqual(kept);
	});

	it('refuses features of another kind and missing values', () => {
		const two = featuresOf([[1, 2]]);
		expect(() => isolation(two, featuresOf([[1, 2, 3]]))).toThrow(RangeError);
		expect(() => isolation(two, featuresOf([[1, NaN]]))).toThrow(RangeError);
		expect(() => momentsOf([{ values: new Float64Array(3), dimensions: 2 }], 2)).toThrow(
			RangeError
		);
	});
});
