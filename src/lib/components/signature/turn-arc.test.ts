import { describe, expect, test } from 'vitest';
import { turnArc, wedgePath } from './turn-arc';

describe('amount drawn', () => {
	test.each([
		[0.25, 4, 0, false],
		[0.5, 8, 0, false],
		[-0.125, 2, 0, true],
		[1, 16, 1, false],
		[1.25, 4, 1, false],
		[3, 16, 3, false],
		[0.01, 1, 0, false],
		[0, 0, 0, false]
	])('%s turns fill %s sixteenths beside %s whole, back %s', (turns, sixteenths, count, isBack) => {
		expect(turnArc(turns)).toEqual({ count, sixteenths, isBack });
	});
});

describe('wedge', () => {
	test('a quarter runs from twelve to three o’clock', () => {
		expect(wedgePath(4, 10, 8)).toBe('M10 10V2A8 8 0 0 1 18 10z');
	});

	test('a half ends at six o’clock by the short way round', () => {
		expect(wedgePath(8, 10, 8)).toBe('M10 10V2A8 8 0 0 1 10 18z');
	});

	test('three quarters go the long way to nine o’clock', () => {
		expect(wedgePath(12, 10, 8)).toBe('M10 10V2A8 8 0 1 1 2 10z');
	});

	test('a full turn is a circle without a seam, nothing is nothing', () => {
		expect(wedgePath(16, 10, 8)).toBe('M10 2a8 8 0 1 1 0 16a8 8 0 1 1 0 -16z');
		expect(wedgePath(0, 10, 8)).toBe('');
	});
});
