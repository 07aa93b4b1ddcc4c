import { checkPath, checkSpikes } from '$lib/analysis/session/check-input';
import type { Epoch } from '$lib/analysis/position/epochs';
import { encodeSpikes } from '$lib/analysis/spikes/spike-blob';
import {
	readEpochs,
	readPosition,
	readSpikes,
	readUnits
} from '$lib/analysis/tables/read-session-tables';
import { spikesFromNpyPair, type SpikeTable } from '$lib/analysis/tables/spike-table';
import { TableError } from '$lib/analysis/tables/table-error';
import type { UnitRow } from '$lib/analysis/tables/units-table';
import type { DataRefusal } from '$lib/schemas/data-state';
import type { DataKind } from '$lib/schemas/enumerations';
import { storage } from '$lib/server/storage';
import { putTrack } from '$lib/server/storage/position-track';
import { counted } from './counted';

/** A stretch of time on the recorder's clock. */
export interface Span {
	firstS: number;
	lastS: number;
}

export interface ReadTableInput {
	kind: DataKind;
	sha256: string;
	bytes: number;
	decimal?: '.' | ',';
	mapping?: Record<string, string>;
	pxPerCm?: number;
	/** The other of two arrays, with unit labels. */
	labelsSha256?: string;
	/** When the session's positions were, if it has them: spikes must share a moment with them. */
	positionSpan?: Span;
}

/** A unit with its times packed. */
export interface PackedUnit {
	label: string;
	bundle: string | null;
	spikes: Uint8Array;
	spikeCount: number;
	firstS: number | null;
	lastS: number | null;
}

export type ReadTableOutput =
	| { refused: DataRefusal }
	| { kind: 'position'; rows: number; trackSha256: string; span: Span; warnings: string[] }
	| { kind: 'spikes'; rows: number; units: PackedUnit[]; span: Span; warnings: string[] }
	| { kind: 'units'; rows: number; units: UnitRow[] }
	| { kind: 'epochs'; rows: number; epochs: Epoch[] };

/** Reads a kept file whole. Positions go to storage from here, spikes back as blobs. */
export async function readTableTask(
	input: ReadTableInput,
	tell: (share: number) => void
): Promise<ReadTableOutput> {
	try {
		return await read(input, tell);
	} catch (fault) {
		if (!(fault instanceof TableError)) throw fault;
		const { code, row, column } = fault;
		return { refused: { code, message: sentence(fault.reason), row, column } };
	}
}

async function read(
	input: ReadTableInput,
	tell: (share: number) => void
): Promise<ReadTableOutput> {
	const { kind, sha256, bytes, decimal, mapping, pxPerCm } = input;
	const options = { decimal, mapping, bytes };
	const open = async () =>
		counted(await storage().read(sha256), (done) => tell(bytes > 0 ? done / bytes : 1));
	switch (kind) {
		case 'position': {
			const path = await readPosition(await open(), { ...options, pxPerCm });
			const warnings: string[] = [];
			checkPath(path, warnings);
			const span = { firstS: path.tS[0], lastS: path.tS[path.tS.length - 1] };
			return { kind, rows: path.tS.length, trackSha256: await putTrack(path), span, warnings };
		}
		case 'spikes': {
			const table = input.labelsSha256
				? spikesFromNpyPair(await whole(sha256), await whole(input.labelsSha256))
				: await readSpikes(await open(), options);
			return packed(table, input.positionSpan);
		}
		case 'units': {
			const units = await readUnits(await open(), options);
			return { kind, rows: units.length, units };
		}
		case 'epochs': {
			const epochs = await readEpochs(await open(), options);
			return { kind, rows: epochs.length, epochs };
		}
	}
}

function packed(table: SpikeTable, path: Span | undefined): ReadTableOutput {
	if (path) checkSpikes(table.units, path.firstS, path.lastS);
	const units = table.units.map(({ unit, bundle, timesS }) => ({
		label: unit,
		bundle,
		spikes: encodeSpikes(timesS),
		spikeCount: timesS.length,
		firstS: timesS.at(0) ?? null,
		lastS: timesS.at(-1) ?? null
	}));
	const span = {
		firstS: Math.min(...units.map(({ firstS }) => firstS ?? Infinity)),
		lastS: Math.max(...units.map(({ lastS }) => lastS ?? -Infinity))
	};
	return { kind: 'spikes', rows: table.spikes, units, span, warnings: [...table.warnings] };
}

async function whole(sha256: string): Promise<Uint8Array> {
	return Buffer.concat(await (await storage().read(sha256)).toArray());
}

function sentence(reason: string): string {
	const text = reason.charAt(0).toUpperCase() + reason.slice(1);
	return /[.!?]$/.test(text) ? text : `${text}.`;
}
