/**
 * Every colour of the product, per theme. The style sheet, the charts drawn on
 * canvas and the contrast test all read this table, so they cannot drift apart.
 */
export const themes = ['bench', 'evening', 'red'] as const;
export type Theme = (typeof themes)[number];

const bench = {
	enamel: '#dfe8e1',
	'enamel-deep': '#cfdbd2',
	paper: '#fbfcf9',
	well: '#eef3ed',
	layer: '#f5e9cf',
	ink: '#14211e',
	soft: '#4c5d57',
	/** Inactive ornaments only: too pale for text, axes or controls. */
	faint: '#8a9a93',
	/** Outline of things one can type into or tick; reaches 3:1, unlike the hairlines. */
	edge: '#6f8078',
	rule: '#c4d0c8',
	hair: '#dde5df',
	brass: '#8a6414',
	'brass-fill': '#b5852b',
	hold: '#1c6b59',
	watch: '#875700',
	advance: '#a8285a',
	parked: '#596460',
	trace: '#2b5c8a',
	fault: '#a3271c',
	shade: '#14211e'
};

export type Token = keyof typeof bench;

export const tokens: Record<Theme, Record<Token, string>> = {
	bench,
	evening: {
		enamel: '#121b18',
		'enamel-deep': '#0c1311',
		paper: '#18231f',
		well: '#202d28',
		layer: '#3a3220',
		ink: '#e3ece6',
		soft: '#a9b9b1',
		faint: '#74867d',
		edge: '#7d9087',
		rule: '#33443c',
		hair: '#263530',
		brass: '#e0b558',
		'brass-fill': '#c99a3c',
		hold: '#62c9ad',
		watch: '#e6b24c',
		advance: '#f184ab',
		parked: '#93a19a',
		trace: '#8ab7e6',
		fault: '#ff9a8a',
		shade: '#000000'
	},
	red: {
		enamel: '#0b0000',
		'enamel-deep': '#000000',
		paper: '#120101',
		well: '#200302',
		layer: '#2c0603',
		ink: '#ff5a48',
		soft: '#e34b3b',
		faint: '#8e2318',
		edge: '#b8372a',
		rule: '#521009',
		hair: '#300805',
		brass: '#ff5a48',
		'brass-fill': '#b43324',
		hold: '#ff5a48',
		watch: '#ff5a48',
		advance: '#ff5a48',
		parked: '#e34b3b',
		trace: '#ff5a48',
		fault: '#ff5a48',
		shade: '#000000'
	}
};

/** `#14211e` as `20 33 30`, the form `rgb(var(--ink) / 50%)` needs. */
export function channels(hex: string): [number, number, number] {
	const value = Number.parseInt(hex.slice(1), 16);
	return [(value >> 16) & 255, (value >> 8) & 255, value & 255];
}

export function customProperties(theme: Theme): Record<string, string> {
	return Object.fromEntries(
		Object.entries(tokens[theme]).map(([name, hex]) => [`--${name}`, channels(hex).join(' ')])
	);
}
