import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { rowsInForce } from './rows-in-force';

const row = (id: string, minute: number, replacesId: string | null = null) => ({
	id,
	doneAt: new Date(Date.UTC(2026, 2, 2, 9, minute)),
	replacesId
});
const ids = (rows: { id: string }[]) => rows.map(({ id }) => id);

describe('rowsInForce', () => {
	it('sorts by when a turn was done, not by when it was entered', () => {
		expect(ids(rowsInForce([row('a', 5), row('b', 1)]))).toEqual(['b', 'a']);
	});

	it('lets the last of a chain of corrections stand', () => {
		expect(ids(rowsInForce([row('a', 1), row('b', 1, 'a'), row('c', 2, 'b')]))).toEqual(['c']);
	});

	it('gives the same rows for every order of entry', () => {
		const rows = [row('a', 3), row('b', 1), row('c', 3, 'a'), row('d', 3), row('e', 2)];
		const random = seeded(3);
		for (let round = 0; round < 50; round++) {
			const order = [...shuffled(rows.length, random)].map((i) => rows[i]);
			expect(ids(rowsInForce(order))).toEqual(['b', 'e', 'c', 'd']);
		}
	});

	it('leaves its input alone', () => {
		const rows = Object.freeze([row('a', 5), row('b', 1)]);
		rowsInForce(rows);
		expect(ids([...rows])).toEqual(['a', 'b']);
	});
});
