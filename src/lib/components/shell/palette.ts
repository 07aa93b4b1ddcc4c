import type { ResolvedPathname } from '$app/types';

/** Something the palette can open. */
export interface PaletteItem {
	label: string;
	/** What kind of thing it is, or a line that tells it apart: "Page", "Long-Evans, male". */
	detail: string;
	href: ResolvedPathname;
	/** Codes are set in Mono. */
	isCode?: boolean;
}

/** Case and accents do not matter when somebody looks for a name. */
function folded(text: string): string {
	return text
		.normalize('NFD')
		.replace(/\p{Mark}/gu, '')
		.toLowerCase();
}

/** 0 starts with the query, 1 a later word does, 2 contains it, 3 only the detail does. */
function rank(item: PaletteItem, query: string): number | null {
	const label = folded(item.label);
	if (label.startsWith(query)) return 0;
	if (label.split(/[\s-]+/).some((word) => word.startsWith(query))) return 1;
	if (label.includes(query)) return 2;
	return folded(item.detail).includes(query) ? 3 : null;
}

/** Items that fit a query, best first; within a rank they keep their order. */
export function filterItems(items: PaletteItem[], query: string, most = 12): PaletteItem[] {
	const wanted = folded(query.trim());
	return items
		.map((item) => ({ item, rank: rank(item, wanted) }))
		.filter((entry): entry is { item: PaletteItem; rank: number } => entry.rank !== null)
		.sort((a, b) => a.rank - b.rank)
		.slice(0, most)
		.map((entry) => entry.item);
}
/** Row the palette's arrow keys lead to, round the ends; null for other keys. */
export function rowAfterKey(key: string, at: number, count: number): number | null {
	if (count === 0) return null;
	if (key === 'ArrowDown') return (at + 1) % count;
	if (key === 'ArrowUp') return (at + count - 1) % count;
	if (key === 'PageDown') return count - 1;
	if (key === 'PageUp') return 0;
	return null;
}
