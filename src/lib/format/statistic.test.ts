import { expect, test } from 'vitest';
import { formatEstimate, formatP, formatR } from './statistic';

test('an estimate carries its interval, one decimal coarser', () => {
	expect(formatEstimate({ value: 8.456, interval: [7.91, 9.14], unit: 'cm' })).toBe(
		'8.46 cm (7.9–9.1)'
	);
});

test('an interval across zero is written with "to"', () => {
	expect(formatEstimate({ value: 0.12, interval: [-0.24, 0.51], decimals: 2 })).toBe(
		'0.12 (−0.2 to 0.5)'
	);
});

test('without an interval only the value is shown, without a value nothing is', () => {
	expect(formatEstimate({ value: 3, unit: 'cm', decimals: 0, interval: null })).toBe('3 cm');
	expect(formatEstimate({ value: null, interval: [1, 2] })).toBe('–');
});

test.each([
	[0.0004, 'p < 0.001'],
	[0.002, 'p = 0.002'],
	[0.246, 'p = 0.25'],
	[1, 'p = 1.00'],
	[null, '–']
])('p of %s reads %s', (p, text) => {
	expect(formatP(p)).toBe(text);
});

test('a correlation keeps its sign', () => {
	expect(formatR(-0.123)).toBe('r −0.12');
});
