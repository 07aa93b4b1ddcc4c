const DAY_MS = 86_400_000;

/** Whole days from one calendar day to another; negative when `to` is the earlier one. */
export function daysBetween(from: string, to: string): number {
	return Math.round((Date.parse(to) - Date.parse(from)) / DAY_MS);
}

/** The calendar day `days` later. */
export function dayAfter(day: string, days = 1): string {
	return new Date(Date.parse(day) + days * DAY_MS).toISOString().slice(0, 10);
}

/** Every day from one to another, both included; none when they are the wrong way round. */
export function daysFrom(first: string, last: string): string[] {
	const count = Math.max(0, daysBetween(first, last) + 1);
	return Array.from({ length: count }, (_, n) => dayAfter(first, n));
}
