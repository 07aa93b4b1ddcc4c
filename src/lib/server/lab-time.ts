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
