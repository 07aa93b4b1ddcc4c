import { createWriteStream } from 'node:fs';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { BenchDay } from './simulate-day';

/** Files of a simulated day. */
export interface DayTables {
	readonly position: string;
	readonly spikes: string;
}

const ROWS = 65_536;

/** Writes a day as tables of text. */
export async function writeTables(day: BenchDay, folder: string): Promise<DayTables> {
	const tables = { position: join(folder, 'position.csv'), spikes: join(folder, 'spikes.csv') };
	await write(tables.position, 't_s,x_cm,y_cm', day.tS.length, (i) => {
		return `${day.tS[i].toFixed(6)},${day.xCm[i].toFixed(2)},${day.yCm[i].toFixed(2)}`;
	});
	await write(tables.spikes, 'unit,t_s', day.spikeS.length, (k) => {
		return `${day.spikeUnit[k]},${day.spikeS[k].toFixed(6)}`;
	});
	return tables;
}

async function write(
	path: string,
	header: string,
	rows: number,
	line: (row: number) => string
): Promise<void> {
	function* pieces() {
		yield `${header}\n`;
		for (let from = 0; from < rows; from += ROWS) {
			const lines = Array.from({ length: Math.min(ROWS, rows - from) }, (_, k) => line(from + k));
			yield `${lines.join('\n')}\n`;
		}
	}
	await pipeline(Readable.from(pieces()), createWriteStream(path));
}
