import { FIELDS, plainHeader, type FieldSpec } from './fields';
import { TableError, type TableKind } from './table-error';

/** Header of a column → field it holds; '' to leave a column out. */
export type Mapping = Readonly<Record<string, string>>;

/** What a column seems to hold. */
export interface Proposal {
	readonly column: string;
	readonly field: string | null;
	/** The header names field and unit; otherwise a person should confirm. */
	readonly isCertain: boolean;
}

/** Says for every column what it seems to hold, each role at most once. */
export function proposeColumns(table: TableKind, header: readonly string[]): Proposal[] {
	const specs = FIELDS[table];
	const taken = new Set<string>();
	const choose = (matches: (spec: FieldSpec, plain: string) => boolean) =>
		header.map((column) => {
			const spec = specs.find((s) => !taken.has(s.role) && matches(s, plainHeader(column)));
			if (spec) taken.add(spec.role);
			return spec?.field ?? null;
		});
	const certain = choose((s, plain) => s.field === plain || s.aliases.includes(plain));
	const guessed = choose((s, plain) => s.guesses.includes(plain));
	return header.map((column, i) => ({
		column,
		field: certain[i] ?? guessed[i],
		isCertain: certain[i] !== null
	}));
}

/**
 * The field of every column, null for columns that are not read.
 * @param mapping decides alone when given; else only certain headers count
 * @throws TableError a required column is missing, or the mapping does not fit
 */
export function columnFields(
	table: TableKind,
	header: readonly string[],
	mapping?: Mapping
): (FieldSpec | null)[] {
	const chosen = mapping
		? mapped(table, header, mapping)
		: proposeColumns(table, header).map(({ field, isCertain }) => (isCertain ? field : null));
	const specs = chosen.map((field) => FIELDS[table].find((spec) => spec.field === field) ?? null);
	const roles = specs.flatMap((spec) => spec?.role ?? []);
	const missing = FIELDS[table].find((spec) => spec.isRequired && !roles.includes(spec.role));
	if (missing) {
		const found = header.map((name) => name || '(empty)').join(', ');
		const reason = `no column ${missing.field}; the header reads: ${found}`;
		throw new TableError(table, 'header', reason, 1, missing.field);
	}
	return specs;
}

function mapped(table: TableKind, header: readonly string[], mapping: Mapping): (string | null)[] {
	const roles = new Map<string, string>();
	for (const [column, field] of Object.entries(mapping)) {
		if (field === '') continue;
		if (!header.includes(column)) {
			throw new TableError(table, 'mapping', 'the table has no such column', 1, column);
		}
		const spec = FIELDS[table].find((s) => s.field === field);
		if (!spec)
			throw new TableError(table, 'mapping', `"${field}" is no field of ${table}`, 1, column);
		const other = roles.get(spec.role);
		if (other !== undefined) {
			const reason = `holds ${field}, but column ${other} already holds it`;
			throw new TableError(table, 'mapping', reason, 1, column);
		}
		roles.set(spec.role, column);
	}
	return header.map((column) => mapping[column] || null);
}
