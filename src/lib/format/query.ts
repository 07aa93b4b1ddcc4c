/** "a=1&b=2" of what is set, for the address of a filtered list. */
export function queryOf(fields: Record<string, string | number | null | undefined>): string {
	const set = Object.entries(fields).filter(([, value]) => value !== undefined && value !== null);
	return new URLSearchParams(set.map(([name, value]) => [name, String(value)])).toString();
}
