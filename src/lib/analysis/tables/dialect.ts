import { TableError, type TableKind } from './table-error';

/** How a delimited table is written. */
export interface Dialect {
	readonly delimiter: ',' | ';' | '\t';
	readonly decimal: '.' | ',';
}

/** Splits one line into cells: quotes are taken off, a doubled quote inside them is one. */
export function splitLine(line: string, delimiter: string): string[] {
	const cells: string[] = [];
	let cell = '';
	let isQuoted = false;
	for (let i = 0; i < line.length; i++) {
		const c = line[i];
		if (isQuoted) {
			if (c !== '"') cell += c;
			else if (line[i + 1] === '"') cell += line[++i];
			else isQuoted = false;
		} else if (c === '"' && cell.trim() === '') {
			cell = '';
			isQuoted = true;
		} else if (c === delimiter) {
			cells.push(cell.trim());
			cell = '';
		} else {
			cell += c;
		}
	}
	cells.push(cell.trim());
	return cells;
}

/** A tab anywhere in the header separates; else a semicolon; else a comma. */
function delimiterOf(header: string): Dialect['delimiter'] {
	const bare = header.replace(/"[^"]*"/g, '');
	if (bare.includes('\t')) return '\t';
	return bare.includes(';') ? ';' : ',';
}

/** Lines that decide how a table is written. */
const LOOKED_AT = 200;
const COMMA_NUMBER = /^[+-]?\d*,\d+([eE][+-]?\d+)?$/;

/** A comma is the decimal mark when it does not separate and stands in a number of the first rows. */
function decimalOf(delimiter: Dialect['delimiter'], rows: readonly string[][]): Dialect['decimal'] {
	if (delimiter === ',') return '.';
	return rows.some((cells) => cells.some((cell) => COMMA_NUMBER.test(cell))) ? ',' : '.';
}

/** Header, dialect and first rows of a delimited table. */
export interface Beginning {
	readonly header: readonly string[];
	readonly dialect: Dialect;
	readonly rows: readonly string[][];
}

/**
 * Reads the beginning of a delimited table.
 * @param text first bytes as text, with the header line whole; an unfinished last line is not read
 * @param isWhole the text is the whole table
 * @throws TableError when there is no header: nothing at all, or numbers in its place
 */
export function readBeginning(table: TableKind, text: string, isWhole: boolean): Beginning {
	const lines = text.replace(/^\uFEFF/, '').split(/\r?\n/, LOOKED_AT);
	if (!isWhole && lines.length < LOOKED_AT) lines.pop();
	const [first = '', ...rest] = lines;
	if (first.trim() === '') {
		throw new TableError(table, 'empty', 'the file is empty or begins with an empty line', 1);
	}
	const delimiter = delimiterOf(first);
	const header = splitLine(first, delimiter);
	const isNumber = (cell: string) => cell !== '' && Number.isFinite(Number(cell.replace(',', '.')));
	if (header.every(isNumber)) {
		throw new TableError(
			table,
			'header',
			'the first row holds numbers; a header must name the columns',
			1
		);
	}
	const twice = header.find((name, i) => name !== '' && header.indexOf(name) !== i);
	if (twice !== undefined) {
		throw new TableError(table, 'header', 'two columns have this name', 1, twice);
	}
	const rows = rest.filter((line) => line.trim() !== '').map((line) => splitLine(line, delimiter));
	return {
		header,
		dialect: { delimiter, decimal: decimalOf(delimiter, rows) },
		rows
	};
}
