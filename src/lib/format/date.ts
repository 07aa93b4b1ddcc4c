import { DateTime } from 'luxon';

/** A moment as the database or JSON gives it. */
type Moment = Date | string;

function at(moment: Moment, zone: string): DateTime {
	const read =
		moment instanceof Date
			? DateTime.fromJSDate(moment, { zone })
			: DateTime.fromISO(moment, { zone });
	// One locale for the whole product: the lab's words are English whatever the browser.
	return read.setLocale('en-GB');
}

/** "14:32" in the lab's zone. */
export function formatClock(moment: Moment, zone: string): string {
	return at(moment, zone).toFormat('HH:mm');
}

/** "9 Apr 2026, 14:32" in the lab's zone. */
export function formatMoment(moment: Moment, zone: string): string {
	return at(moment, zone).toFormat('d LLL yyyy, HH:mm');
}

/** A lab day "2026-04-09" as "9 Apr 2026"; a day has no zone. */
export function formatDay(day: string): string {
	return at(day, 'utc').toFormat('d LLL yyyy');
}

/** "9 Apr", where the year is plain from its surroundings. */
export function formatDayShort(day: string): string {
	return at(day, 'utc').toFormat('d LLL');
}

/** "Thursday 9 April". */
export function formatWeekday(day: string): string {
	return at(day, 'utc').toFormat('cccc d LLLL');
}

/** What `<input type="datetime-local">` wants, in the lab's zone. */
export function toInputMoment(moment: Moment, zone: string): string {
	return at(moment, zone).toFormat("yyyy-MM-dd'T'HH:mm");
}

/** The moment that a `datetime-local` field says, on the lab's clock. */
export function fromInputMoment(text: string, zone: string): Date {
	return DateTime.fromISO(text, { zone }).toJSDate();
}

/** Rough age of a moment: "just now", "5 min ago", "3 h ago", then the date. */
export function formatAgo(moment: Moment, now: Moment, zone: string): string {
	const minutes = at(now, zone).diff(at(moment, zone), 'minutes').minutes;
	if (minutes < 1) return 'just now';
	if (minutes < 60) return `${Math.floor(minutes)} min ago`;
	if (minutes < 24 * 60) return `${Math.floor(minutes / 60)} h ago`;
	return formatMoment(moment, zone);
}
