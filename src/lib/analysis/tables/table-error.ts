/** The tables a session is made of. */
export type TableKind = 'position' | 'spikes' | 'units' | 'waveforms' | 'features' | 'epochs';

/** Why a table was refused; stable, for programs. */
export type TableCode =
	| 'empty'
	| 'not-a-table'
	| 'header'
	| 'mapping'
	| 'ragged'
	| 'not-a-number'
	| 'missing-value'
	| 'time-order'
	| 'absurd-position'
	| 'outside-arena'
	| 'unit-of-time'
	| 'no-spikes'
	| 'no-overlap'
	| 'too-short'
	| 'not-a-kind'
	| 'duplicate'
	| 'truncated'
	| 'too-large';

/**
 * A table that cannot be used. Rows are counted as a spreadsheet does: the header is row 1.
 * `reason` is a sentence for the person who sent the file.
 */
export class TableError extends Error {
	override readonly name = 'TableError';

	constructor(
		readonly table: TableKind,
		readonly code: TableCode,
		readonly reason: string,
		readonly row: number | null = null,
		readonly column: string | null = null
	) {
		const place = [row === null ? '' : `row ${row}`, column === null ? '' : `column ${column}`];
		super([table, ...place].filter(Boolean).join(', ') + `: ${reason}`);
	}
}
