import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { denseTransition } from './dense-transition';
import { smoothedBelief } from './smoothed-belief';
import { twoStatePosterior } from './two-state-window';

describe('twoStatePosterior', () => {
	const { input, expected, tol } = referenceCase<
		{ pSpikeInside: number; pSpikeOutside: number },
		{ prior: number; windows: number; spikes: number; posterior: number; exact: string }[]
	>('07_bernoulli_window.json', 'single_cell_window');

	it.each(expected)(
		'is $exact with prior $prior after $spikes of $windows windows with a spike (exact fractions)',
		({ prior, windows, spikes, posterior, exact }) => {
			const got = twoStatePosterior(
				prior,
				spikes,
				windows,
				input.pSpikeInside,
				input.pSpikeOutside
			);
			expect(Math.abs(got - posterior)).toBeLessThan(tol);
			const [over, under] = exact.split('/').map(Number);
			expect(Math.abs(got - over / under)).toBeLessThan(tol);
		}
	);

	const cases: Record<string, [spikes: number, windows: number]> = {
		spike: [1, 1],
		silent: [0, 1],
		'2 spikes': [2, 2],
		'1 of 2': [1, 2],
		'2 silent': [0, 2],
		'3 spikes': [3, 3],
		'3 silent': [0, 3]
	};
	const table = referenceCase<unknown, Record<string, Record<string, number>>>(
		'00_checks.json',
		'd2'
	).expected;

	it.each(
		Object.entries(table).flatMap(([prior, row]) =>
			Object.entries(row).map(([name, posterior]) => ({ prior: Number(prior), name, posterior }))
		)
	)(
		'is $posterior with prior $prior after $name (exact fractions)',
		({ prior, name, posterior }) => {
			const [spikes, windows] = cases[name];
			expect(
				Math.abs(twoStatePosterior(prior, spikes, windows, 0.1, 0.01) - posterior)
			).toBeLessThan(1e-12);
		}
	);

	it('has all 28 entries of the table', () => {
		expect(Object.values(table).flatMap((row) => Object.keys(row)).length).toBe(28);
		expect(expected.length).toBe(36);
	});

	it('is the two-place walk that never steps, window after window', () => {
		const stay = denseTransition(Float64Array.of(0, -Infinity, -Infinity, 0));
		const logs = [1, 0, 1].flatMap((is) => (is ? [0.1, 0.01] : [0.9, 0.99]).map(Math.log));
		const { filtered } = smoothedBelief(
			Float64Array.of(Math.log(0.2), Math.log(0.8)),
			Float64Array.from(logs),
			[null, stay, stay]
		);
		expect(filtered[0]).toBeCloseTo(twoStatePosterior(0.2, 1, 1, 0.1, 0.01), 12);
		expect(filtered[2]).toBeCloseTo(twoStatePosterior(0.2, 1, 2, 0.1, 0.01), 12);
		expect(filtered[4]).toBeCloseTo(twoStatePosterior(0.2, 2, 3, 0.1, 0.01), 12);
	});

	it('beats a coin after one spike only if the prior exceeds 1/11 (hand-worked)', () => {
		expect(twoStatePosterior(1 / 11, 1, 1, 0.1, 0.01)).toBeCloseTo(0.5, 14);
		expect(twoStatePosterior(0.09, 1, 1, 0.1, 0.01)).toBeLessThan(0.5);
	});

	it('keeps certainty, sees what is impossible, and is undefined when both states are', () => {
		expect(twoStatePosterior(1, 0, 5, 0.1, 0.01)).toBe(1);
		expect(twoStatePosterior(0, 5, 5, 0.1, 0.01)).toBe(0);
		expect(twoStatePosterior(0.5, 1, 1, 0.1, 0)).toBe(1);
		expect(twoStatePosterior(0.5, 0, 1, 1, 0.01)).toBe(0);
		expect(twoStatePosterior(0.3, 0, 0, 0.1, 0.01)).toBeCloseTo(0.3, 15);
		expect(twoStatePosterior(0.5, 1, 2, 0, 1)).toBeNaN();
	});

	it('refuses what is no probability and more spikes than windows', () => {
		expect(() => twoStatePosterior(1.1, 0, 1, 0.1, 0.01)).toThrow(RangeError);
		expect(() => twoStatePosterior(0.5, 0, 1, NaN, 0.01)).toThrow(RangeError);
		expect(() => twoStatePosterior(0.5, 2, 1, 0.1, 0.01)).toThrow(RangeError);
	});
});
