import { describe, expect, it } from 'vitest';
import { labDays } from '../../../src/demo/lab-days';
import { holdLabAt } from '../services/lab-of-tests';

describe('the days of the demo lab', () => {
	it.each([
		['2026-03-10T15:00:00Z', '2026-03-10', '2026-03-10T10:00:00.000Z'],
		['2026-03-10T09:00:00Z', '2026-03-10', '2026-03-10T07:00:00.000Z'],
		['2026-03-10T07:00:00Z', '2026-03-09', '2026-03-09T10:00:00.000Z'],
		['2026-03-11T01:00:00Z', '2026-03-10', '2026-03-10T10:00:00.000Z']
	])('at %s end on %s, with the work of ten o’clock done at %s', async (moment, date, ten) => {
		const release = await holdLabAt(moment);
		const days = await labDays();
		expect(days.date(0)).toBe(date);
		expect(days.at(0, '10:00').toISOString()).toBe(ten);
		expect(days.at(0, '12:00').getTime()).toBeLessThanOrEqual(new Date(moment).getTime());
		release();
	});

	it('before the last keep their usual hours', async () => {
		const release = await holdLabAt('2026-03-10T09:00:00Z');
		const days = await labDays();
		expect(days.at(2, '10:00').toISOString()).toBe('2026-03-08T10:00:00.000Z');
		release();
	});
});
