import type { Column } from './column';
import { splitLine, type Dialect } from './dialect';
import type { FieldSpec } from './fields';
import { MOST_LABELS } from './label-table';
import { oddNumber } from './odd-number';
import { plainRows, type PlainRows } from './plain-rows';
import { TableError, type TableKind } from './table-error';

const LF = 10;
const CR = 13;
const SPACE = 32;
const QUOTE = 34;
const PLUS = 43;
const MINUS = 45;
const ZERO = 48;
/** Whole numbers up to here are exact, and so is their division by an exact power of ten. */
const EXACT = 2 ** 53;
const TENS = Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));

/** With more odd rows than this, and more than one in sixteen, the compiled reader is no help. */
const MOST_ODD = 20_000;

/**
 * Reads rows of a delimited table from bytes into columns. The loop over bytes is one function on
 * purpose: a call per cell would cost more than the cell.
 */
export class RowReader {
	/** Data rows read. */
	rows = 0;
	/** Line of the file being read; the header is line 1. */
	line = 1;

	private plain: PlainRows | null;
	/** Rows that the compiled reader left. */
	private odd = 0;

	/** @param plan the column of each cell, null for cells that are not read */
	constructor(
		private readonly table: TableKind,
		private readonly header: readonly string[],
		private readonly dialect: Dialect,
		private readonly plan: readonly (Column | null)[]
	) {
		this.plain = plainRows(plan, dialect);
	}

	/** @param bytes whole rows, each ended by a line feed */
	read(bytes: Uint8Array): void {
		let at = 0;
		while (at < bytes.length) {
			if (!this.plain) {
				this.readAny(bytes.subarray(at), Infinity);
				return;
			}
			const piece = this.plain.lay(bytes, at);
			for (let from = 0; from < piece;) {
				const { rows, stop } = this.plain.read(from, piece, this.rows);
				this.rows += rows;
				this.line += rows;
				from = stop;
				if (from < piece) {
					from += this.readAny(bytes.subarray(at + from, at + piece), 1);
					this.odd++;
				}
			}
			at += piece;
			if (this.odd > MOST_ODD + this.rows / 16) this.plain = null;
		}
	}

	/**
	 * Reads up to `limit` lines, however they are written.
	 * @returns bytes read
	 */
	private readAny(bytes: Uint8Array, limit: number): number {
		const { plan } = this;
		const last = plan.length - 1;
		const delimiter = this.dialect.delimiter.charCodeAt(0);
		const mark = this.dialect.decimal.charCodeAt(0);
		const most = this.rows + Math.min(limit, Math.ceil(bytes.length / (2 * plan.length)) + 1);
		for (const column of plan) (column?.numbers ?? column?.ids)?.reserve(most);
		let at = 0;
		for (let left = limit; left > 0 && at < bytes.length; left--) {
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
						value = this.oddValue(bytes, at, end, c, column.spec);
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
		return at;
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

	/** Numbers the quick path leaves, and faults. */
	private oddValue(
		bytes: Uint8Array,
		from: number,
		to: number,
		c: number,
		spec: FieldSpec
	): number {
		const cell = this.text(bytes, from, to);
		const value = oddNumber(cell, this.dialect.decimal);
		if (typeof value === 'number') return value;
		if (value === 'missing' && spec.mayBeEmpty) return NaN;
		const shown = cell.length > 40 ? `${cell.slice(0, 40)}…` : cell;
		if (value === 'not-a-number') throw this.fault(value, `"${shown}" is not a number`, c);
		const reason =
			cell === '' ? 'the cell is empty' : `"${shown}" is no value; leave such rows out`;
		throw this.fault('missing-value', reason, c);
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
