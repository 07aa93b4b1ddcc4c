/** "Ada Byron Lovelace" as "AL": first letters of the first and the last word. */
export function initials(name: string): string {
	const words = name.trim().split(/\s+/);
	const ends = words.length > 1 ? [words[0], words[words.length - 1]] : words;
	return ends
		.map((word) => [...word][0] ?? '')
		.join('')
		.toLocaleUpperCase('en');
}
