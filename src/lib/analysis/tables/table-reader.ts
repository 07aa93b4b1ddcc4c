import { columnFields, type Mapping } from './columns';
import { readBeginning, splitLine, type Dialect } from './dialect';
import type { FieldSpec } from './fields';
import { GrowingFloat64, GrowingInt32 } from './growing';
import { LabelTable, MOST_LABELS } from './label-table';
import { recognise } from './magic';
import { TableError, type TableKind } from './table-error';

const LF = 10;
const CR = 13;
const SPACE = 32;
const QUOTE = 34;
const PLUS = 43;
const MINUS = 45;
const ZERO = 48;
/** Bytes gathered before header and dialect are decided. */
const BEGINNING = 65_536;
/** A table has no such lines; without a limit one without line feeds would fill the memory. */
const LONGEST_LINE = 1_048_576;
/** Whole numbers up to here are exact, and so is their division by an exact power of ten. */
const EXACT = 2 ** 53;
const TENS = Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));
const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** A column that is read. */
export interface Column {
	readonly spec: FieldSpec;
	/** Numbers in the product's unit; null for labels. */
	readonly numbers: GrowingFloat64 | null;
	/** Number of each label in `labels`; null for numbers. */
	readonly ids: GrowingInt32 | null;
	readonly labels: LabelTable | null;
}

export interface TableOptions {
	readonly mapping?: Mapping;
	/** Decides the decimal mark instead of the first rows. */
	readonly decimal?: Dialect['decimal'];
}

/**
 * Reads a delimited table from chunks of bytes, straight into typed arrays: no text is made of
 * numbers, and every number is the nearest float64. Feed with `push`, then call `end` once.
 * Blank lines are skipped. Any fault throws a TableError with row and column; the reader is then done.
 */
export class TableReader {
	/** Columns that are read, in the order of the header. Empty until the header has been seen. */
	columns: Column[] = [];
	/** Data rows read. */
	rows = 0;
	private header: readonly string[] = [];
	private plan: (Column | null)[] = [];
	private dialect: Dialect = { delimiter: ',', decimal: '.' };
	private rest = new Uint8Array(0);
	private line = 1;
	private hasBegun = false;

	constructor(
		private readonly table: TableKind,
		private readonly options: TableOptions = {}
	) {}

	push(chunk: Uint8Array): void {
		if (!this.hasBegun) {
			this.rest = joined(this.rest, chunk);
			if (this.rest.length >= BEGINNING) this.begin(false);
			return;
		}
		const cut = chunk.lastIndexOf(LF) + 1;
		if (cut === 0) {
			this.rest = joined(this.rest, chunk);
			if (this.rest.length > LONGEST_LINE) this.refuseEndless();
			return;
		}
		this.readRows(joined(this.rest, chunk.subarray(0, cut)));
		this.rest = chunk.slice(cut);
	}

	end(): void {
		if (!this.hasBegun) this.begin(true);
		if (this.rest.length > 0) this.readRows(joined(this.rest, Uint8Array.of(LF)));
		this.rest = new Uint8Array(0);
		if (this.rows === 0)
			throw new TableError(this.table, 'empty', 'there is a header and no row below it');
	}

	/** The column of a role, null when the table has none. */
	column(role: string): Column | null {
		return this.columns.find(({ spec }) => spec.role === role) ?? null;
	}

	private begin(isWhole: boolean): void {
		this.hasBegun = true;
		const bytes = this.rest;
		if (bytes.length === 0) throw new TableError(this.table, 'empty', 'the file is empty');
		const other = recognise(bytes);
		if (other) {
			throw new TableError(this.table, 'not-a-table', `this is ${other}, not a table of text`);
		}
		const text = new TextDecoder().decode(bytes);
		const { header, dialect } = readBeginning(this.table, text, isWhole);
		this.header = header;
		this.dialect = { ...dialect, decimal: this.options.decimal ?? dialect.decimal };
		this.plan = columnFields(this.table, header, this.options.mapping).map(
			(spec) => spec && newColumn(spec)
		);
		this.columns = this.plan.filter((column) => column !== null);
		const headerEnd = lineEnd(bytes, 0);
		this.rest = new Uint8Array(0);
		this.push(bytes.subarray(headerEnd));
	}

	/** @param bytes whole rows, each ended by a line feed */
	private readRows(bytes: Uint8Array): void {
		const { plan } = this;
		const last = plan.length - 1;
		const delimiter = this.dialect.delimiter.charCodeAt(0);
		const mark = this.dialect.decimal.charCodeAt(0);
		const most = this.rows + Math.ceil(bytes.length / (2 * plan.length)) + 1;
		for (const { numbers, ids } of this.columns) (numbers ?? ids)?.reserve(most);
		let at = 0;
		while (at < bytes.length) {
			this.line++;
			let blank = at;
			while (bytes[blank] === SPACE || bytes[blank] === CR) blank++;
			if (bytes[blank] === LF) {
				at = blank + 1;
				continue;
			}
			for (let c = 0; c <= last; c++) {
				const column = plan[c];
				if (column?.numbers) {
					let i = at;
					while (bytes[i] === SPACE) i++;
					const sign = bytes[i];
					if (sign === MINUS || sign === PLUS) i++;
					const first = i;
					let mantissa = 0;
					let digit = bytes[i] - ZERO;
					while (digit >= 0 && digit <= 9) {
						mantissa = mantissa * 10 + digit;
						digit = bytes[++i] - ZERO;
					}
					let decimals = 0;
					let digits = i - first;
					if (bytes[i] === mark) {
						const from = ++i;
						digit = bytes[i] - ZERO;
						while (digit >= 0 && digit <= 9) {
							mantissa = mantissa * 10 + digit;
							digit = bytes[++i] - ZERO;
						}
						decimals = i - from;
						digits += decimals;
					}
					while (bytes[i] === SPACE) i++;
					const stop = bytes[i];
					const isEnd = stop === delimiter || stop === LF || stop === CR;
					let value: number;
					if (isEnd && digits > 0 && mantissa < EXACT && decimals < 23) {
						value = mantissa / TENS[decimals];
						if (sign === MINUS) value = -value;
						at = i;
					} else {
						const end = this.cellEnd(bytes, at, delimiter);
						value = this.oddNumber(bytes, at, end, c, column.spec);
						at = end;
					}
					const { factor, divisor } = column.spec;
					column.numbers.values[this.rows] = (value * factor) / divisor;
				} else {
					const end = this.cellEnd(bytes, at, delimiter);
					if (column) this.readLabel(bytes, at, end, c, column);
					at = end;
				}
				if (c < last) {
					if (bytes[at] !== delimiter) this.refuseShort(c + 1);
					at++;
				}
			}
			if (bytes[at] === delimiter) this.refuseLong(bytes, at, delimiter);
			if (bytes[at] === CR) at++;
			if (bytes[at] === LF) at++;
			this.rows++;
		}
	}

	/** Index of the delimiter or line end after a cell; quotes hide what is inside them. */
	private cellEnd(bytes: Uint8Array, from: number, delimiter: number): number {
		let i = from;
		while (bytes[i] === SPACE) i++;
		if (bytes[i] === QUOTE) {
			i++;
			while (i < bytes.length && !(bytes[i] === QUOTE && bytes[i + 1] !== QUOTE)) {
				i += bytes[i] === QUOTE ? 2 : 1;
			}
			i++;
		}
		while (i < bytes.length && bytes[i] !== delimiter && bytes[i] !== LF && bytes[i] !== CR) i++;
		return i;
	}

	private text(bytes: Uint8Array, from: number, to: number): string {
		const raw = new TextDecoder().decode(bytes.subarray(from, to));
		return splitLine(raw, this.dialect.delimiter)[0];
	}

	/** Numbers the quick path leaves: exponents, quotes, more digits than float64 holds, and faults. */
	private oddNumber(
		bytes: Uint8Array,
		from: number,
		to: number,
		c: number,
		spec: FieldSpec
	): number {
		const cell = this.text(bytes, from, to);
		if (cell === '') {
			if (spec.mayBeEmpty) return NaN;
			throw this.fault('missing-value', 'the cell is empty', c);
		}
		const isMixed = this.dialect.decimal === ',' && cell.includes('.');
		const plain = this.dialect.decimal === ',' ? cell.replace(',', '.') : cell;
		if (!isMixed && PLAIN_NUMBER.test(plain) && Number.isFinite(Number(plain)))
			return Number(plain);
		const shown = cell.length > 40 ? `${cell.slice(0, 40)}…` : cell;
		if (/^[+-]?(nan|null|na|inf(inity)?)$/i.test(cell)) {
			if (spec.mayBeEmpty) return NaN;
			throw this.fault('missing-value', `"${shown}" is no value; leave such rows out`, c);
		}
		throw this.fault('not-a-number', `"${shown}" is not a number`, c);
	}

	private readLabel(
		bytes: Uint8Array,
		start: number,
		stop: number,
		c: number,
		column: Column
	): void {
		if (!column.labels || !column.ids) return;
		let from = start;
		let to = stop;
		while (from < to && bytes[from] === SPACE) from++;
		while (to > from && bytes[to - 1] === SPACE) to--;
		let source = bytes;
		if (bytes[from] === QUOTE) {
			source = new TextEncoder().encode(this.text(bytes, from, to));
			from = 0;
			to = source.length;
		}
		if (to === from && !column.spec.mayBeEmpty) {
			throw this.fault('missing-value', 'the cell is empty', c);
		}
		const id = column.labels.intern(source, from, to);
		if (id < 0) {
			const reason = `more than ${MOST_LABELS} different labels; is this the right column?`;
			throw this.fault('too-large', reason, c);
		}
		column.ids.values[this.rows] = id;
	}

	private fault(code: 'missing-value' | 'not-a-number' | 'too-large', reason: string, c: number) {
		return new TableError(this.table, code, reason, this.line, this.header[c]);
	}

	private refuseEndless(): never {
		const reason = 'a line longer than 1 MB; rows must end with a line feed';
		throw new TableError(this.table, 'not-a-table', reason, this.line + 1);
	}

	private refuseShort(cells: number): never {
		const reason = `${cells} cells, but the header has ${this.header.length}`;
		throw new TableError(this.table, 'ragged', reason, this.line);
	}

	private refuseLong(bytes: Uint8Array, from: number, delimiter: number): never {
		let cells = this.header.length;
		for (let i = from; i < bytes.length && bytes[i] !== LF; i++)
			if (bytes[i] === delimiter) cells++;
		const hint =
			delimiter === 44 ? '; with decimal commas the columns must be separated by semicolons' : '';
		const reason = `${cells} cells, but the header has ${this.header.length}${hint}`;
		throw new TableError(this.table, 'ragged', reason, this.line);
	}
}

function newColumn(spec: FieldSpec): Column {
	return spec.type === 'number'
		? { spec, numbers: new GrowingFloat64(), ids: null, labels: null }
		: { spec, numbers: null, ids: new GrowingInt32(), labels: new LabelTable() };
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array<ArrayBuffer> {
	const out = new Uint8Array(a.length + b.length);
	out.set(a);
	out.set(b, a.length);
	return out;
}

/** Index after the first line end. */
function lineEnd(bytes: Uint8Array, from: number): number {
	let i = from;
	while (i < bytes.length && bytes[i] !== LF) i++;
	return Math.min(bytes.length, i + 1);
}
