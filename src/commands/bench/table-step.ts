import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { joinSpikeTables } from '../../lib/analysis/tables/join-spike-tables';
import { positionsOf } from '../../lib/analysis/tables/position-table';
import { spikesOf, type SpikeTable } from '../../lib/analysis/tables/spike-table';
import type { TableKind } from '../../lib/analysis/tables/table-error';
import { TableReader } from '../../lib/analysis/tables/table-reader';
import type { Crew } from './crew';
import type { BenchDay } from './simulate-day';
import type { DayTables } from './write-tables';

const LF = 10;
const PIECE = 1 << 20;
/** Longer than any header or row of these tables. */
const ROW = 1024;

export interface ReadPartInput {
	tables: DayTables;
	thread: number;
	threads: number;
}

export interface ReadPartOutput {
	spikes: SpikeTable;
	/** Rows of positions; the first thread reads them. */
	samples: number;
}

/** Reads a thread's part of the spikes, and in the first thread all positions. */
export function readPart(
	_day: BenchDay,
	{ tables, thread, threads }: ReadPartInput
): ReadPartOutput {
	const spikes = spikesOf(
		readRange('spikes', tables.spikes, thread / threads, (thread + 1) / threads)
	);
	if (thread > 0) return { spikes, samples: 0 };
	return { spikes, samples: positionsOf(readRange('position', tables.position, 0, 1)).tS.length };
}

/** Reads the rows that begin in a stretch of a file, given as shares of its length. */
function readRange(table: TableKind, path: string, from: number, to: number): TableReader {
	const file = openSync(path, 'r');
	const { size } = fstatSync(file);
	const edge = (share: number) => (share >= 1 ? size : rowAfter(file, Math.floor(share * size)));
	const stop = edge(to);
	const reader = new TableReader(table, { bytes: stop - edge(from) });
	const piece = new Uint8Array(PIECE);
	if (from > 0) reader.push(piece.slice(0, readSync(file, piece, 0, rowAfter(file, 1), 0)));
	for (let at = edge(from); at < stop;) {
		const got = readSync(file, piece, 0, Math.min(PIECE, stop - at), at);
		reader.push(piece.subarray(0, got));
		at += got;
	}
	reader.end();
	closeSync(file);
	return reader;
}

/** Where the first row after a byte begins. */
function rowAfter(file: number, at: number): number {
	if (at === 0) return 0;
	const bytes = new Uint8Array(ROW);
	const got = readSync(file, bytes, 0, ROW, at - 1);
	return at + bytes.subarray(0, got).indexOf(LF);
}

/** Both tables from text to numbers, spikes by unit. */
export async function tableStep(
	crew: Crew,
	tables: DayTables
): Promise<{ spikes: number; samples: number }> {
	const parts = await crew.all('read-part', (thread) => ({
		tables,
		thread,
		threads: crew.threads
	}));
	const joined = joinSpikeTables(parts.map(({ spikes }) => spikes));
	return { spikes: joined.spikes, samples: parts[0].samples };
}
