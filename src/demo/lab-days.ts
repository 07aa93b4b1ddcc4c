import { DateTime } from 'luxon';
import { now } from '$lib/server/clock';
import { labClock } from '$lib/server/services/lab-clock';

/** How demo days lie against the clock: day 0 is the last one told, one step a day back. */
export interface LabDays {
	date(daysAgo: number): string;
	at(daysAgo: number, time: string): Date;
}

/** By this hour of a usual day everything the demo tells of it has been done. */
const DONE_AT = '12:00';

/** The lab's morning can begin this much earlier and still lie within its day. */
const EARLIER_MS = 4 * 3600 * 1000;

/**
 * Days that end today. On a morning the last day's work is told as done earlier than usual; in the
 * first hours of a lab day there is none yet, and the days end yesterday.
 */
export async function labDays(): Promise<LabDays> {
	const { zone, today } = await labClock();
	const moment = (date: string, time: string) =>
		DateTime.fromISO(`${date}T${time}`, { zone }).toJSDate();
	const aheadMs = Math.max(0, moment(today, DONE_AT).getTime() - now().getTime());
	const isToday = aheadMs <= EARLIER_MS;
	const last = DateTime.fromISO(today, { zone }).minus({ days: isToday ? 0 : 1 });
	const date = (daysAgo: number) => last.minus({ days: daysAgo }).toFormat('yyyy-MM-dd');
	return {
		date,
		at: (daysAgo, time) => {
			const usual = moment(date(daysAgo), time).getTime();
			return new Date(isToday && daysAgo === 0 ? usual - aheadMs : usual);
		}
	};
}
