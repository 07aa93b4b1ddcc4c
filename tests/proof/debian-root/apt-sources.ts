/** One place packages come from, as a Debian system describes it. */
export interface AptSource {
	uri: string;
	suites: string[];
}

/** Reads both of apt's formats: `deb URI SUITE …` lines and paragraphs of fields (deb822). */
export function parseAptSources(text: string): AptSource[] {
	const lines = text.split('\n').filter((line) => !line.trimStart().startsWith('#'));
	const oneLine = lines.flatMap((line) => {
		const words = line
			.replace(/\[[^\]]*\]/, '')
			.trim()
			.split(/\s+/);
		return words[0] === 'deb' && words.length >= 3 ? [{ uri: words[1], suites: [words[2]] }] : [];
	});
	const paragraphs = lines
		.join('\n')
		.split(/\n\s*\n/)
		.flatMap((paragraph) => {
			const field = (name: string) =>
				new RegExp(`^${name}:(.*(?:\\n[ \\t].*)*)`, 'mi').exec(paragraph)?.[1].trim().split(/\s+/);
			const types = field('Types');
			const suites = field('Suites');
			if (!types?.includes('deb') || !suites || /^enabled:\s*no/im.test(paragraph)) return [];
			return (field('URIs') ?? []).map((uri) => ({ uri, suites }));
		});
	return [...oneLine, ...paragraphs];
}

/** The mirror that serves a release's main suite. */
export function mirrorOf(release: string, sources: AptSource[]): string | undefined {
	return sources.find(({ suites }) => suites.includes(release))?.uri;
}
