import type { Snippet } from 'svelte';

/** One column of a DataTable. */
export interface DataColumn<Row> {
	id: string;
	label: string;
	/** What is sorted and searched; null sorts last in either order. */
	value: (row: Row) => string | number | null;
	/** What is shown; the value itself when left out. */
	cell?: Snippet<[Row]>;
	/** Figures are set in Mono and to the right. */
	isFigure?: boolean;
	/** The column a row is known by cannot be hidden. */
	isFixed?: boolean;
	/** Hidden until somebody asks for it. */
	isHiddenAtFirst?: boolean;
}

/** Hidden columns as kept on this device; anything unreadable is as good as nothing kept. */
export function readHidden(kept: string | null, known: string[]): string[] | null {
	if (kept === null) return null;
	try {
		const parsed: unknown = JSON.parse(kept);
		return Array.isArray(parsed) ? known.filter((id) => parsed.includes(id)) : null;
	} catch {
		return null;
	}
}
