import { now } from '$lib/server/clock';
import { labDay } from '$lib/server/lab-time';
import * as labSettings from './lab-settings';

/** How the lab tells the day of any moment. */
export interface LabClock {
	zone: string;
	/** The lab day of now. */
	today: string;
	dayOf(moment: Date): string;
}

export async function labClock(): Promise<LabClock> {
	const { timeZone: zone, dayStartsAt } = await labSettings.get('lab');
	const dayOf = (moment: Date) => labDay(moment, zone, dayStartsAt);
	return { zone, today: dayOf(now()), dayOf };
}

/** The lab day of now. */
export async function today(): Promise<string> {
	return (await labClock()).today;
}
