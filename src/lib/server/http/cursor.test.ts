import { describe, expect, it } from 'vitest';
import { pageOf } from './cursor';

const letters = ['d', 'a', 'c', 'b'];
const same = (letter: string) => letter;

describe('pageOf', () => {
	it('gives all in order of the keys, and no cursor, when they fit', () => {
		expect(pageOf(letters, same, { limit: 4 })).toEqual({
			items: ['a', 'b', 'c', 'd'],
			nextCursor: null
		});
	});

	it('goes on after the last key given out, also when that item is gone meanwhile', () => {
		const first = pageOf(letters, same, { limit: 2 });
		expect(first.items).toEqual(['a', 'b']);
		const cursor = first.nextCursor ?? '';
		expect(pageOf(['a', 'bb', 'c', 'd'], same, { limit: 2, cursor })).toMatchObject({
			items: ['bb', 'c']
		});
	});

	it('ends: every item is given once over all pages', () => {
		const seen: string[] = [];
		let cursor: string | undefined;
		do {
			const page = pageOf(letters, same, { limit: 3, cursor });
			seen.push(...page.items);
			cursor = page.nextCursor ?? undefined;
		} while (cursor);
		expect(seen).toEqual(['a', 'b', 'c', 'd']);
	});

	it('gives an empty list without a cursor', () => {
		expect(pageOf([], same, { limit: 3 })).toEqual({ items: [], nextCursor: null });
	});

	it('refuses a cursor it did not make', () => {
		expect(() => pageOf(letters, same, { limit: 3, cursor: 'made-up' })).toThrow(/nextCursor/);
	});
});
