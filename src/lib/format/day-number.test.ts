import { expect, test } from 'vitest';
import { formatDayNumber, formatDayNumberShort } from './day-number';

test.each([
	[23, 'D+23', '+23'],
	[0, 'surgery', 'surg.'],
	[-2, 'D−2', '−2']
])('day %s reads %s and %s', (days, long, short) => {
	expect(formatDayNumber(days)).toBe(long);
	expect(formatDayNumberShort(days)).toBe(short);
});

test('an animal without an implant has no day number', () => {
	expect(formatDayNumber(null)).toBe('–');
});
