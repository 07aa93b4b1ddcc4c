import type { PageQuery } from '$lib/schemas/api/paging';
import { BadRequest } from './protocol-refusals';

/**
 * One page of a list in the order of its keys. The cursor holds the last key given out, so rows
 * added or withdrawn meanwhile neither repeat nor hide another.
 * @param keyOf unique per item; compared as text by code unit
 */
export function pageOf<T>(
	all: readonly T[],
	keyOf: (item: T) => string,
	{ limit, cursor }: PageQuery
): { items: T[]; nextCursor: string | null } {
	const after = cursor === undefined ? null : readCursor(cursor);
	const rest = all
		.map((item) => ({ item, key: keyOf(item) }))
		.filter(({ key }) => after === null || key > after)
		.sort((a, b) => (a.key < b.key ? -1 : 1));
	const page = rest.slice(0, limit);
	const last = page.at(-1);
	return {
		items: page.map(({ item }) => item),
		nextCursor: last && rest.length > limit ? writeCursor(last.key) : null
	};
}

function writeCursor(key: string): string {
	return Buffer.from(`v1:${key}`).toString('base64url');
}

function readCursor(cursor: string): string {
	const text = Buffer.from(cursor, 'base64url').toString();
	if (!text.startsWith('v1:')) {
		throw new BadRequest([
			{ field: 'cursor', message: 'Send the nextCursor of an answer as it came, or none.' }
		]);
	}
	return text.slice('v1:'.length);
}
