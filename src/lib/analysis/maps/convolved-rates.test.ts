import { describe, expect, it } from 'vitest';
import { numbers, referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { parseArena } from '../arena/parse-arena';
import { convolvedRates } from './convolved-rates';
import { smootherOf } from './smoother';

type Numbers = (number | null)[];

function smoothed(text: string, binCm: number, sigmaCm: number) {
	const arena = parseArena(text);
	const bins = binsOf(arena, binCm);
	return { bins, smooth: smootherOf(arena, bins, sigmaCm, 'reflect') };
}

describe('convolvedRates', () => {
	it('leaves an unvisited bin out and does not pull its neighbours down (scipy.ndimage)', () => {
		const { input, expected, tol } = referenceCase<
			{ counts: number[]; occupancyS: number[]; sigmaBins: number; minOccupancyS: number },
			{ normalisedConvolution: Numbers; WRONG_zero_filled: number[] }
		>('00_checks.json', 'b2');
		const { smooth } = smoothed('straight:5', 1, input.sigmaBins);
		const counts = Float64Array.from(input.counts);
		const occupancyS = Float64Array.from(input.occupancyS);
		const got = convolvedRates(counts, occupancyS, smooth, input.minOccupancyS);
		expect(worstDifference(got, expected.normalisedConvolution)).toBeLessThan(tol);
		[0, 1, 3, 4].forEach((k) => expect(got[k]).toBeGreaterThan(expected.WRONG_zero_filled[k]));
		expect([...counts]).toEqual(input.counts);
		expect([...occupancyS]).toEqual(input.occupancyS);
	});

	it.each([
		['02_maps_1d.json', 'linear_track', 'straight'],
		['03_maps_circular.json', 'circular_track', 'ring']
	])('agrees with scipy.ndimage on %s', (file, id, kind) => {
		const { input, expected, units } = referenceCase<
			{ length: number; binCm: number; sigmaCm: number; minOccupancyS: number },
			{ occupancyS: number[] }
		>(file, id);
		const { smooth } = smoothed(`${kind}:${input.length}`, input.binCm, input.sigmaCm);
		const occupancyS = Float64Array.from(expected.occupancyS);
		for (const { expected: want } of units as {
			expected: { counts: number[]; rateNormConv: Numbers };
		}[]) {
			const counts = Float64Array.from(want.counts);
			const got = convolvedRates(counts, occupancyS, smooth, input.minOccupancyS);
			expect(worstDifference(got, want.rateNormConv)).toBeLessThan(1e-9);
		}
	});

	it('agrees with scipy.ndimage on a square with one quadrant missing', () => {
		const { input, expected, units } = referenceCase<
			{ side: number; xy10: number[][]; binCm: number; sigmaCm: number; minOccupancyS: number },
			{ occupancyS: number[][] }
		>('04_maps_2d.json', 'open_field_with_missing_quadrant');
		const square = `rectangle:${input.side}x${input.side}`;
		const { bins, smooth } = smoothed(square, input.binCm, input.sigmaCm);
		/** The fixture is [xBin][yBin]. */
		const rowMajor = (columns: readonly Numbers[]) =>
			numbers(
				Array.from(bins.centreXCm, (_, k) => columns[k % bins.binsX][Math.floor(k / bins.binsX)])
			);
		const occupancyS = rowMajor(expected.occupancyS);
		for (const { spikeSampleIndex, expected: want } of units as {
			spikeSampleIndex: number[];
			expected: { rateNormConv: Numbers[] };
		}[]) {
			const counts = new Float64Array(bins.count);
			for (const i of spikeSampleIndex) {
				const [x, y] = input.xy10[i];
				counts[bins.of(x / 10, y / 10)]++;
			}
			const got = convolvedRates(counts, occupancyS, smooth, input.minOccupancyS);
			expect(worstDifference(got, [...rowMajor(want.rateNormConv)])).toBeLessThan(1e-9);
		}
	});

	it('keeps a constant rate whatever the stays, and is undefined where nobody was', () => {
		const { smooth } = smoothed('straight:12', 1, 2);
		const occupancyS = Float64Array.of(1, 2, 3, 0, 0, 4, 1, 1, 0.05, 2, 5, 1);
		const counts = occupancyS.map((seconds) => 3 * seconds);
		const got = convolvedRates(counts, occupancyS, smooth, 0.1);
		const want = [3, 3, 3, null, null, 3, 3, 3, null, 3, 3, 3];
		expect(worstDifference(got, want)).toBeLessThan(1e-12);
		const nowhere = convolvedRates(new Float64Array(12), new Float64Array(12), smooth, 0.1);
		expect(nowhere.every(Number.isNaN)).toBe(true);
	});

	it('refuses a least dwell of 0 and arrays of two lengths', () => {
		const { smooth } = smoothed('straight:5', 1, 1);
		const five = new Float64Array(5);
		expect(() => convolvedRates(five, five, smooth, 0)).toThrow(RangeError);
		expect(() => convolvedRates(five, new Float64Array(4), smooth, 0.1)).toThrow(RangeError);
	});
});
