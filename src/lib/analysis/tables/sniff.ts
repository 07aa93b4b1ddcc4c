import { proposeColumns, type Proposal } from './columns';
import { readBeginning, type Dialect } from './dialect';
import { FIELDS } from './fields';
import { isNpy, recognise } from './magic';
import { TableError, type TableKind } from './table-error';

/** What the beginning of a file tells, for a person to confirm before it is read. */
export type Sniffed =
	| { readonly format: 'npy' }
	| { readonly format: 'refused'; readonly reason: string }
	| {
			readonly format: 'table';
			readonly dialect: Dialect;
			readonly header: readonly string[];
			/** First rows as written. */
			readonly rows: readonly string[][];
			readonly proposal: readonly Proposal[];
			/** Fields that the proposal does not fill though the table needs them. */
			readonly missing: readonly string[];
			/** A person must look: a guess, a missing column, or a decimal comma. */
			readonly needsConfirming: boolean;
	  };

/** Rows shown to a person. */
const SHOWN = 8;

/**
 * Looks at the beginning of a file without reading it. The name of the file is not asked: a picture
 * renamed to .csv is refused.
 * @param head    first bytes, 64 KB are plenty
 * @param isWhole these are all bytes of the file
 */
export function sniff(table: TableKind, head: Uint8Array, isWhole: boolean): Sniffed {
	if (head.length === 0) return { format: 'refused', reason: 'The file is empty.' };
	const takesArrays = table === 'position' || table === 'spikes';
	if (isNpy(head) && takesArrays) return { format: 'npy' };
	const other = recognise(head);
	if (other) return { format: 'refused', reason: `This is ${other}, not a table of text.` };
	try {
		const text = new TextDecoder().decode(head);
		const { header, dialect, rows } = readBeginning(table, text, isWhole);
		const proposal = proposeColumns(table, header);
		const roleOf = (field: string | null) =>
			FIELDS[table].find((spec) => spec.field === field)?.role;
		const roles = proposal.map(({ field }) => roleOf(field));
		const missing = FIELDS[table]
			.filter((spec, i, all) => {
				const isFirst = all.findIndex(({ role }) => role === spec.role) === i;
				return spec.isRequired && isFirst && !roles.includes(spec.role);
			})
			.map(({ field }) => field);
		const hasGuess = proposal.some(({ field, isCertain }) => field !== null && !isCertain);
		return {
			format: 'table',
			dialect,
			header,
			rows: rows.slice(0, SHOWN),
			proposal,
			missing,
			needsConfirming: hasGuess || missing.length > 0 || dialect.decimal === ','
		};
	} catch (error) {
		if (error instanceof TableError) return { format: 'refused', reason: error.reason };
		throw error;
	}
}
