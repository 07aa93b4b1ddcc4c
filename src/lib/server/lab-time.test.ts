import { describe, expect, it } from 'vitest';
import { labDay } from './lab-time';

describe('labDay', () => {
	it.each([
		['2026-04-09T01:59:59Z', '2026-04-08'],
		['2026-04-09T02:00:00Z', '2026-04-09'],
		['2026-04-10T01:59:59Z', '2026-04-09']
	])('in Oslo, summer time, %s is in %s', (at, day) => {
		expect(labDay(new Date(at), 'Europe/Oslo', '04:00')).toBe(day);
	});

	it('follows the wall clock when clocks change (29 March 2026, 02:00 to 03:00)', () => {
		expect(labDay(new Date('2026-03-29T01:59:00Z'), 'Europe/Oslo', '04:00')).toBe('2026-03-28');
		expect(labDay(new Date('2026-03-29T02:00:00Z'), 'Europe/Oslo', '04:00')).toBe('2026-03-29');
	});

	it('starts at midnight when the lab says so, and knows zones off the hour', () => {
		expect(labDay(new Date('2026-01-01T18:29:00Z'), 'Asia/Kolkata', '00:00')).toBe('2026-01-01');
		expect(labDay(new Date('2026-01-01T18:30:00Z'), 'Asia/Kolkata', '00:00')).toBe('2026-01-02');
	});

	it('refuses a moment or a zone that does not exist', () => {
		expect(() => labDay(new Date(NaN), 'UTC', '04:00')).toThrow(RangeError);
		expect(() => labDay(new Date(0), 'Mars/Olympus', '04:00')).toThrow(RangeError);
	});
});
