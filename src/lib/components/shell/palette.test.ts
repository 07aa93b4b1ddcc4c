import { expect, test } from 'vitest';
import { filterItems, rowAfterKey, type PaletteItem } from './palette';

const items: PaletteItem[] = [
	{ label: 'Today', detail: 'Page', href: '/' },
	{ label: 'Animals', detail: 'Page', href: '/' },
	{ label: 'R031', detail: 'Long-Evans, male', href: '/' },
	{ label: 'M112', detail: 'Mus musculus', href: '/' },
	{ label: 'Ánimal facility', detail: 'Page', href: '/' }
];

const labels = (query: string) => filterItems(items, query).map((item) => item.label);

test('an empty query shows all in their order', () => {
	expect(labels('')).toEqual(['Today', 'Animals', 'R031', 'M112', 'Ánimal facility']);
});

test('case and accents do not matter', () => {
	expect(labels('anim')).toEqual(['Animals', 'Ánimal facility']);
	expect(labels('r03')).toEqual(['R031']);
});

test('the start of the name comes before its middle, and that before the detail', () => {
	expect(labels('m')).toEqual(['M112', 'Animals', 'Ánimal facility', 'R031']);
});

test('nothing that does not fit is shown', () => {
	expect(labels('zebra')).toEqual([]);
});

test.each([
	['ArrowDown', 2, 0],
	['ArrowUp', 0, 2],
	['PageDown', 0, 2],
	['a', 1, null]
])('%s on row %s of three leads to %s', (key, at, to) => {
	expect(rowAfterKey(key, at, 3)).toBe(to);
});
