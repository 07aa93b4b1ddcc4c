import { expect, test } from 'vitest';
import { formatCount, formatNumber, formatQuantity, formatShare } from './number';

test.each([
	[-0.4, 1, '−0.4'],
	[-0.04, 1, '0.0'],
	[8.456, 2, '8.46'],
	[null, 1, '–'],
	[Number.NaN, 1, '–']
])('%s with %s decimals reads %s', (value, decimals, text) => {
	expect(formatNumber(value, decimals)).toBe(text);
});

test('counts are grouped by thousands, and zero is not absent', () => {
	expect(formatCount(1_234_567)).toBe('1\u2009234\u2009567');
	expect(formatCount(0)).toBe('0');
	expect(formatCount(null)).toBe('–');
});

test('one thing is singular, any other number plural', () => {
	expect(formatQuantity(1, 'unit')).toBe('1 unit');
	expect(formatQuantity(0, 'unit')).toBe('0 units');
	expect(formatQuantity(2, 'entry', 'entries')).toBe('2 entries');
});

test('a share is shown in percent', () => {
	expect(formatShare(0.914)).toBe('91 %');
	expect(formatShare(null)).toBe('–');
});
