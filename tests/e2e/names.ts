/** Ends names of one run, so that a lab kept from an earlier run is no hindrance. */
export const TAG = Date.now().toString(36).slice(-5).toUpperCase();

/** The calendar day so long ago, "2026-04-09". */
export function daysAgo(days: number): string {
	return new Date(Date.now() - days * 24 * 3600 * 1000).toISOString().slice(0, 10);
}
