import { DateTime } from 'luxon';

/**
 * The lab day a moment belongs to: at 04:00, the small hours still count to the day before.
 * @param zone     IANA zone of the lab
 * @param startsAt wall-clock time `HH:MM` at which a lab day begins
 * @returns `YYYY-MM-DD`. By the wall clock, so days of a change of clocks have 23 or 25 hours.
 */
export function labDay(at: Date, zone: string, startsAt: string): string {
	const local = DateTime.fromJSDate(at, { zone });
	if (!local.isValid) throw new RangeError(`No such moment or zone: ${at.getTime()}, ${zone}`);
	const isBefore = local.toFormat('HH:mm') < startsAt;
	return (isBefore ? local.minus({ days: 1 }) : local).toFormat('yyyy-MM-dd');
}

/** Zones to choose from. Made on the server: a browser may know other ones. */
export function timeZones(): string[] {
	return ['UTC', ...Intl.supportedValuesOf('timeZone')];
}

/** First moment of a calendar day in the lab's zone, and of the day after it. */
export function dayBounds(day: string, zone: string): { start: Date; end: Date } {
	const start = DateTime.fromISO(day, { zone }).startOf('day');
	if (!start.isValid) throw new RangeError(`No such day or zone: ${day}, ${zone}`);
	return { start: start.toJSDate(), end: start.plus({ days: 1 }).toJSDate() };
}
