import { newAnimalSchema, type NewAnimal } from './animal';
import { readPastedTable } from './pasted-table';

export interface PastedIssue {
	/** Heading of the cell to blame, '' for the line. */
	column: string;
	message: string;
}

/** One line of a pasted list: the animal it describes, or what is wrong with it. */
export interface PastedAnimal {
	line: number;
	cells: Record<string, string>;
	animal: NewAnimal | null;
	issues: PastedIssue[];
}

export interface PastedAnimals {
	/** Headings in the order pasted; unknown ones are refused, never dropped. */
	columns: string[];
	rows: PastedAnimal[];
	/** Why no line could be read at all. */
	refusal: string | null;
}

/** What a column may be headed; the first is ours. Also the order when no headings are pasted. */
const HEADINGS: Record<string, string[]> = {
	code: ['code', 'animal', 'id', 'name'],
	species: ['species'],
	strain: ['strain', 'line'],
	sex: ['sex'],
	birthDate: ['birth date', 'birth', 'born', 'date of birth', 'dob'],
	source: ['source', 'supplier'],
	status: ['status'],
	baselineWeightG: ['baseline weight', 'baseline', 'baseline g', 'weight', 'weight g'],
	protocol: ['protocol'],
	project: ['project'],
	note: ['note', 'notes', 'comment']
};
export const PASTE_COLUMNS = Object.values(HEADINGS).map(([heading]) => heading);

const SHORT_SEXES: Record<string, string> = { f: 'female', m: 'male', u: 'unknown', '': 'unknown' };

export function readPastedAnimals(text: string): PastedAnimals {
	const { lines } = readPastedTable(text);
	if (lines.length === 0) return refused('There is nothing to read yet. Paste the list.');
	const headed = lines[0].cells.map(fieldOf);
	const hasHeadings = headed.includes('code');
	const names = Object.keys(HEADINGS);
	const columns = hasHeadings ? lines[0].cells : PASTE_COLUMNS;
	const fields = hasHeadings ? headed : names;
	const unknown = columns.filter((_, at) => fields[at] === null);
	if (unknown.length > 0) {
		return refused(
			`No animal has “${unknown.join('”, “')}”. Headings that are known: ${PASTE_COLUMNS.join(', ')}.`
		);
	}
	if (new Set(fields).size < fields.length) return refused('Two columns have the same meaning.');
	const rows = (hasHeadings ? lines.slice(1) : lines).map(({ number, cells }) =>
		readRow(number, cells, fields, columns)
	);
	if (rows.length === 0) return refused('There are headings, but no animal below them.');
	markRepeated(rows);
	return { columns: columns.slice(0, widest(rows, columns)), rows, refusal: null };
}

const refused = (refusal: string): PastedAnimals => ({ columns: [], rows: [], refusal });

function fieldOf(heading: string): string | null {
	const plain = heading
		.toLowerCase()
		.replace(/[_(),]+/g, ' ')
		.replace(/\s+/g, ' ')
		.trim();
	return Object.keys(HEADINGS).find((field) => HEADINGS[field].includes(plain)) ?? null;
}

function readRow(
	line: number,
	cells: string[],
	fields: (string | null)[],
	columns: string[]
): PastedAnimal {
	const headingOf = new Map(fields.map((field, at) => [field, columns[at]]));
	const shown = Object.fromEntries(columns.map((column, at) => [column, cells[at] ?? '']));
	const surplus = cells.slice(columns.length).filter((cell) => cell !== '');
	if (surplus.length > 0) {
		const message = `More cells than columns: “${surplus[0]}”.`;
		return { line, cells: shown, animal: null, issues: [{ column: '', message }] };
	}
	const values = Object.fromEntries(
		fields.map((field, at) => [field, valueOf(field, cells[at] ?? '')])
	);
	const read = newAnimalSchema.safeParse({ sex: 'unknown', ...values });
	if (read.success) return { line, cells: shown, animal: read.data, issues: [] };
	const issues = read.error.issues.map(({ path, message }) => ({
		column: headingOf.get(String(path[0])) ?? '',
		message
	}));
	return { line, cells: shown, animal: null, issues };
}

function valueOf(field: string | null, cell: string): unknown {
	const lower = cell.toLowerCase();
	switch (field) {
		case 'sex':
			return SHORT_SEXES[lower] ?? lower;
		case 'species':
			return lower;
		case 'status':
			return lower === '' ? undefined : lower.replaceAll(' ', '-').replace('in-the-lab', 'in-lab');
		case 'baselineWeightG':
			return cell === '' ? null : Number(cell.replace(/ ?g$/i, '').replace(',', '.'));
		case 'birthDate':
			return cell === '' ? null : dayOf(cell);
		default:
			return cell;
	}
}

/** Days with points are day first; with slashes they could be either, so those are refused. */
function dayOf(cell: string): string {
	const dotted = /^(\d{1,2})\.(\d{1,2})\.(\d{4})$/.exec(cell);
	if (!dotted) return cell;
	return `${dotted[3]}-${dotted[2].padStart(2, '0')}-${dotted[1].padStart(2, '0')}`;
}

function markRepeated(rows: PastedAnimal[]): void {
	const seen = new Map<string, number>();
	for (const row of rows) {
		const code = row.animal?.code.toUpperCase();
		if (code === undefined) continue;
		const before = seen.get(code);
		if (before === undefined) seen.set(code, row.line);
		else row.issues.push({ column: 'code', message: `Line ${before} has this code already.` });
	}
}

/** Without headings, columns to the right that nobody filled are not shown. */
function widest(rows: PastedAnimal[], columns: string[]): number {
	return columns.findLastIndex((column) => rows.some(({ cells }) => cells[column] !== '')) + 1;
}
