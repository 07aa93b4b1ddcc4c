import { expect, test } from 'vitest';
import {
	formatAgo,
	formatClock,
	formatDay,
	formatDayShort,
	formatMoment,
	formatWeekday,
	toInputMoment
} from './date';

const berlin = 'Europe/Berlin';

test('a moment is shown in the lab zone, not the reader’s', () => {
	expect(formatMoment('2026-04-09T12:32:00Z', berlin)).toBe('9 Apr 2026, 14:32');
	expect(formatClock(new Date('2026-04-09T23:30:00Z'), 'America/New_York')).toBe('19:30');
});

test('the clock follows the change to winter time', () => {
	expect(formatClock('2026-10-25T00:30:00Z', berlin)).toBe('02:30');
	expect(formatClock('2026-10-25T01:30:00Z', berlin)).toBe('02:30');
	expect(formatClock('2026-10-25T02:30:00Z', berlin)).toBe('03:30');
});

test('a lab day never shifts with a zone', () => {
	expect(formatDay('2026-04-09')).toBe('9 Apr 2026');
	expect(formatDayShort('2026-12-31')).toBe('31 Dec');
	expect(formatWeekday('2026-04-09')).toBe('Thursday 9 April');
});

test('form fields get the local time of the lab', () => {
	expect(toInputMoment('2026-04-09T12:32:10Z', berlin)).toBe('2026-04-09T14:32');
});

test.each([
	['2026-04-09T12:31:30Z', 'just now'],
	['2026-04-09T12:27:00Z', '5 min ago'],
	['2026-04-09T09:00:00Z', '3 h ago'],
	['2026-04-01T09:00:00Z', '1 Apr 2026, 11:00']
])('%s reads %s', (moment, text) => {
	expect(formatAgo(moment, '2026-04-09T12:32:00Z', berlin)).toBe(text);
});
