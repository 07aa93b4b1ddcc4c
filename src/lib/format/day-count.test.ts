import { describe, expect, it } from 'vitest';
import { dayAfter, daysBetween, daysFrom } from './day-count';

describe('counting days', () => {
	it('is not shaken by a change of clocks or a leap day', () => {
		expect(daysBetween('2026-03-28', '2026-03-30')).toBe(2);
		expect(daysBetween('2024-02-28', '2024-03-01')).toBe(2);
		expect(daysBetween('2026-04-09', '2026-04-01')).toBe(-8);
	});

	it('steps over the ends of months and years', () => {
		expect(dayAfter('2025-12-31')).toBe('2026-01-01');
		expect(dayAfter('2026-03-01', -1)).toBe('2026-02-28');
	});

	it('lists both ends, and nothing backwards', () => {
		expect(daysFrom('2026-02-27', '2026-03-01')).toEqual([
			'2026-02-27',
			'2026-02-28',
			'2026-03-01'
		]);
		expect(daysFrom('2026-03-02', '2026-03-01')).toEqual([]);
	});
});
