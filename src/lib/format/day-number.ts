/** Days counted from the implant's surgery: "D+23", "D−2", "surgery" on the day itself. */
export function formatDayNumber(days: number | null): string {
	if (days === null) return '–';
	if (days === 0) return 'surgery';
	return days > 0 ? `D+${days}` : `D−${-days}`;
}

/** The narrow form of the day strip: "surg.", "+23", "−2". */
export function formatDayNumberShort(days: number): string {
	if (days === 0) return 'surg.';
	return days > 0 ? `+${days}` : `−${-days}`;
}
