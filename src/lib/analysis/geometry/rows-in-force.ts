/** A row of the ledger of turns; a later row may replace an earlier one. */
export interface LedgerRow {
	readonly id: string;
	readonly doneAt: Date;
	readonly replacesId: string | null;
}

/**
 * The rows no other row replaces, by the time they were done; rows of the same moment by id.
 * The order of entry does not matter.
 */
export function rowsInForce<R extends LedgerRow>(rows: readonly R[]): R[] {
	const replaced = new Set(rows.map(({ replacesId }) => replacesId));
	return rows
		.filter(({ id }) => !replaced.has(id))
		.sort((a, b) => a.doneAt.getTime() - b.doneAt.getTime() || (a.id < b.id ? -1 : 1));
}
