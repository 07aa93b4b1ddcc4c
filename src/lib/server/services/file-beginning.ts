import { FIELDS, plainHeader } from '$lib/analysis/tables/fields';
import { sniff, type Sniffed } from '$lib/analysis/tables/sniff';
import type { DataReading, DataRefusal } from '$lib/schemas/data-state';
import { DATA_KINDS, type DataFormat, type DataKind } from '$lib/schemas/enumerations';
import { storage } from '$lib/server/storage';
import type { Kept } from '$lib/server/storage/store';

/** Bytes looked at before anything is read. */
const HEAD_BYTES = 65_536;

/** What a kept file seems to be, for a person to confirm. */
export interface Beginning {
	kind: DataKind;
	format: DataFormat;
	reading: DataReading;
	refusal: DataRefusal | null;
}

/** @param given what the sender says it is; else the header decides, and a person confirms */
export async function look(kept: Kept, name: string, given: DataKind | null): Promise<Beginning> {
	const head = await headOf(kept);
	const isWhole = kept.bytes <= HEAD_BYTES;
	const kind = given ?? kindOf(head, isWhole, name);
	const seen = sniff(kind, head, isWhole);
	if (seen.format === 'npy') return { kind, format: 'npy', reading: {}, refusal: null };
	if (seen.format === 'refused') {
		const refusal = { code: 'not-a-table', message: seen.reason, row: null, column: null };
		return { kind, format: formatOf(name), reading: {}, refusal };
	}
	return {
		kind,
		format: seen.dialect.delimiter === '\t' ? 'tsv' : 'csv',
		reading: { recognised: recognised(seen) },
		refusal: null
	};
}

async function headOf({ sha256, bytes }: Kept): Promise<Uint8Array> {
	if (bytes === 0) return new Uint8Array(0);
	const end = Math.min(bytes, HEAD_BYTES) - 1;
	return Buffer.concat(await (await storage().read(sha256, { start: 0, end })).toArray());
}

function recognised(
	seen: Extract<Sniffed, { format: 'table' }>
): NonNullable<DataReading['recognised']> {
	return {
		...seen.dialect,
		header: [...seen.header],
		rows: seen.rows.map((row) => row.map((cell) => cell.slice(0, 60))),
		columns: seen.proposal.map((column) => ({ ...column })),
		missing: [...seen.missing],
		needsConfirming: seen.needsConfirming
	};
}

/** The kind whose columns the header fills best; for arrays, which have none, the name decides. */
function kindOf(head: Uint8Array, isWhole: boolean, name: string): DataKind {
	let best: DataKind = /spike|unit|cluster/i.test(name) ? 'spikes' : 'position';
	let most = 0;
	for (const kind of DATA_KINDS) {
		const seen = sniff(kind, head, isWhole);
		if (seen.format !== 'table' || seen.missing.length > 0) continue;
		const known = new Set(FIELDS[kind].flatMap(({ field, aliases }) => [field, ...aliases]));
		const named = seen.header.filter((column) => known.has(plainHeader(column))).length;
		if (named > most) [best, most] = [kind, named];
	}
	return best;
}

function formatOf(name: string): DataFormat {
	if (/\.npy$/i.test(name)) return 'npy';
	return /\.tsv$/i.test(name) ? 'tsv' : 'csv';
}
