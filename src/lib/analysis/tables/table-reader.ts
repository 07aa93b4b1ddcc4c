import { newColumn, type Column } from './column';
import { columnFields, type Mapping } from './columns';
import { readBeginning, type Dialect } from './dialect';
import { recognise } from './magic';
import { RowReader } from './row-reader';
import { TableError, type TableKind } from './table-error';

const LF = 10;
/** Bytes gathered before header and dialect are decided. */
const BEGINNING = 65_536;
/** More rows than a chunk is taken to hold before it is read. */
const SPARE_ROWS = 70_000;
/** A table has no such lines; without a limit one without line feeds would fill the memory. */
const LONGEST_LINE = 1_048_576;

export interface TableOptions {
	readonly mapping?: Mapping;
	/** Decides the decimal mark instead of the first rows. */
	readonly decimal?: Dialect['decimal'];
	/** Length of the whole table where it is known: room is then taken once instead of by growing. */
	readonly bytes?: number;
}

/**
 * Reads a delimited table from chunks of bytes, straight into typed arrays: no text is made of
 * numbers, and every number is the nearest float64. Feed with `push`, then call `end` once.
 * Blank lines are skipped. Any fault throws a TableError with row and column; the reader is then done.
 */
export class TableReader {
	/** Columns that are read, in the order of the header. Empty until the header has been seen. */
	columns: Column[] = [];
	private reader: RowReader | null = null;
	private rest = new Uint8Array(0);

	constructor(
		private readonly table: TableKind,
		private readonly options: TableOptions = {}
	) {}

	push(chunk: Uint8Array): void {
		if (!this.reader) {
			this.rest = joined(this.rest, chunk);
			if (this.rest.length >= BEGINNING) this.begin(false);
			return;
		}
		const cut = chunk.lastIndexOf(LF) + 1;
		if (cut === 0) {
			this.rest = joined(this.rest, chunk);
			if (this.rest.length > LONGEST_LINE) this.refuseEndless(this.reader.line + 1);
			return;
		}
		this.reader.read(joined(this.rest, chunk.subarray(0, cut)));
		this.rest = chunk.slice(cut);
	}

	end(): void {
		const reader = this.reader ?? this.begin(true);
		if (this.rest.length > 0) reader.read(joined(this.rest, Uint8Array.of(LF)));
		this.rest = new Uint8Array(0);
		if (reader.rows === 0) {
			throw new TableError(this.table, 'empty', 'there is a header and no row below it');
		}
	}

	/** Data rows read. */
	get rows(): number {
		return this.reader?.rows ?? 0;
	}

	/** The column of a role, null when the table has none. */
	column(role: string): Column | null {
		return this.columns.find(({ spec }) => spec.role === role) ?? null;
	}

	private begin(isWhole: boolean): RowReader {
		const bytes = this.rest;
		if (bytes.length === 0) throw new TableError(this.table, 'empty', 'the file is empty');
		const other = recognise(bytes);
		if (other) {
			throw new TableError(this.table, 'not-a-table', `this is ${other}, not a table of text`);
		}
		const text = new TextDecoder().decode(bytes.subarray(0, BEGINNING));
		const isAll = isWhole && bytes.length <= BEGINNING;
		const { header, dialect } = readBeginning(this.table, text, isAll);
		const decimal = this.options.decimal ?? dialect.decimal;
		const specs = columnFields(this.table, header, this.options.mapping);
		const plan = specs.map((spec) => spec && newColumn(spec));
		this.columns = plan.filter((column) => column !== null);
		if (this.options.bytes) this.makeRoom(this.options.bytes, bytes);
		const reader = new RowReader(this.table, header, { ...dialect, decimal }, plan);
		this.reader = reader;
		this.rest = new Uint8Array(0);
		this.push(bytes.subarray(bytes.indexOf(LF) + 1 || bytes.length));
		return reader;
	}

	/** Room for as many rows as the first ones let expect; growing still serves where that is wrong. */
	private makeRoom(wholeBytes: number, beginning: Uint8Array): void {
		let lines = 1;
		for (const byte of beginning) if (byte === LF) lines++;
		const rows = Math.ceil((1.02 * wholeBytes * lines) / beginning.length) + SPARE_ROWS;
		for (const { numbers, ids } of this.columns) (numbers ?? ids)?.reserve(rows);
	}

	private refuseEndless(line: number): never {
		const reason = 'a line longer than 1 MB; rows must end with a line feed';
		throw new TableError(this.table, 'not-a-table', reason, line);
	}
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array<ArrayBuffer> {
	const out = new Uint8Array(a.length + b.length);
	out.set(a);
	out.set(b, a.length);
	return out;
}
