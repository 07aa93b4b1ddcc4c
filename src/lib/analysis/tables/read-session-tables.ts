import type { Epoch } from '../position/epochs';
import { epochsOf } from './epochs-table';
import { featuresOf, type BundleFeatures } from './features-table';
import { isNpy, MAGIC_LENGTH } from './magic';
import { positionsFromNpy, positionsOf, type PositionTable } from './position-table';
import { spikesFromNpy, spikesOf, type SpikeTable } from './spike-table';
import type { TableKind } from './table-error';
import { TableReader, type TableOptions } from './table-reader';
import { unitsOf, type UnitRow } from './units-table';
import { waveformsOf, type MeanWaveform } from './waveforms-table';

/** The bytes of a file, piece by piece; nothing but the piece at hand is kept as bytes. */
export type Chunks = AsyncIterable<Uint8Array> | Iterable<Uint8Array>;

export interface PositionOptions extends TableOptions {
	/** Scale for positions in pixels. */
	readonly pxPerCm?: number;
}

/** Reads positions from a delimited table or a `.npy` array, told apart by the first bytes. */
export async function readPosition(
	chunks: Chunks,
	options: PositionOptions = {}
): Promise<PositionTable> {
	const read = await readEither('position', chunks, options);
	return read instanceof TableReader ? positionsOf(read, options.pxPerCm) : positionsFromNpy(read);
}

/** Reads spikes from a delimited table or a `.npy` array, told apart by the first bytes. */
export async function readSpikes(chunks: Chunks, options: TableOptions = {}): Promise<SpikeTable> {
	const read = await readEither('spikes', chunks, options);
	return read instanceof TableReader ? spikesOf(read) : spikesFromNpy(read);
}

/** Reads what is known of units from a delimited table. */
export async function readUnits(chunks: Chunks, options: TableOptions = {}): Promise<UnitRow[]> {
	return unitsOf(await readTable('units', chunks, options));
}

/** Reads mean waveforms from a delimited table. */
export async function readWaveforms(
	chunks: Chunks,
	options: TableOptions = {}
): Promise<MeanWaveform[]> {
	return waveformsOf(await readTable('waveforms', chunks, options));
}

/** Reads the features of every spike from a delimited table. */
export async function readFeatures(
	chunks: Chunks,
	options: TableOptions = {}
): Promise<BundleFeatures[]> {
	return featuresOf(await readTable('features', chunks, options));
}

/** Reads epochs from a delimited table. */
export async function readEpochs(chunks: Chunks, options: TableOptions = {}): Promise<Epoch[]> {
	return epochsOf(await readTable('epochs', chunks, options));
}

async function readTable(
	table: TableKind,
	chunks: Chunks,
	options: TableOptions
): Promise<TableReader> {
	const reader = new TableReader(table, options);
	for await (const chunk of chunks) reader.push(chunk);
	reader.end();
	return reader;
}

/** A table that has been read, or the bytes of a `.npy` file. */
async function readEither(
	table: TableKind,
	chunks: Chunks,
	options: TableOptions
): Promise<TableReader | Uint8Array> {
	const reader = new TableReader(table, options);
	const kept: Uint8Array[] = [];
	let length = 0;
	let isArray: boolean | null = null;
	for await (const chunk of chunks) {
		if (isArray === false) {
			reader.push(chunk);
			continue;
		}
		kept.push(chunk);
		length += chunk.length;
		if (isArray === null && length >= MAGIC_LENGTH) {
			isArray = isNpy(whole(kept, length));
			if (!isArray) for (const part of kept.splice(0)) reader.push(part);
		}
	}
	if (isArray) return whole(kept, length);
	for (const part of kept) reader.push(part);
	reader.end();
	return reader;
}

function whole(parts: readonly Uint8Array[], length: number): Uint8Array {
	const out = new Uint8Array(length);
	let at = 0;
	for (const part of parts) {
		out.set(part, at);
		at += part.length;
	}
	return out;
}
