import { expect, it } from 'vitest';
import { benjaminiHochberg } from './benjamini-hochberg';

it('finds the four discoveries at 0.05 of the published example (Benjamini and Hochberg 1995)', () => {
	// The 15 p-values of section 3.2 of the paper, from memory.
	const p = Object.freeze([
		0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278, 0.0298, 0.0344, 0.0459, 0.324, 0.4262, 0.5719,
		0.6528, 0.759, 1
	]);
	const adjusted = benjaminiHochberg(p);
	expect([...adjusted].filter((q) => q <= 0.05)).toHaveLength(4);
	expect(adjusted[3]).toBeCloseTo((0.0095 * 15) / 4, 14);
	expect(adjusted[14]).toBe(1);
});

it('keeps the order of its input, never falls with p, and passes over NaN (worked by hand)', () => {
	expect([...benjaminiHochberg([0.04, NaN, 0.01, 0.03])]).toEqual([0.04, NaN, 0.03, 0.04]);
	expect(benjaminiHochberg([])).toHaveLength(0);
	expect(() => benjaminiHochberg([1.2])).toThrow(RangeError);
});
