const PROGRAMS: [RegExp, string][] = [
	[/Edg\//, 'Edge'],
	[/OPR\//, 'Opera'],
	[/Firefox\//, 'Firefox'],
	[/Chrom(e|ium)\//, 'Chrome'],
	[/Safari\//, 'Safari'],
	[/curl\//, 'curl']
];

const SYSTEMS: [RegExp, string][] = [
	[/iPhone/, 'iPhone'],
	[/iPad/, 'iPad'],
	[/Android/, 'Android'],
	[/Windows/, 'Windows'],
	[/Mac OS X/, 'Mac'],
	[/CrOS/, 'ChromeOS'],
	[/Linux/, 'Linux']
];

const named = (list: [RegExp, string][], agent: string) =>
	list.find(([pattern]) => pattern.test(agent))?.[1];

/** "Firefox on Linux": enough to tell one's own devices apart. Order matters: most programs claim to be others too. */
export function browserName(userAgent: string | null): string {
	if (!userAgent) return 'Unknown browser';
	const program = named(PROGRAMS, userAgent) ?? 'Unknown browser';
	const system = named(SYSTEMS, userAgent);
	return system ? `${program} on ${system}` : program;
}
