import { newKernel } from '../kernel/kernel';
import type { Column } from './column';
import type { Dialect } from './dialect';

/** Reads plainly written rows with the compiled kernel. */
export interface PlainRows {
	/** Takes a piece of whole rows beginning at `from`. @returns its length in bytes */
	lay(bytes: Uint8Array, from: number): number;
	/**
	 * Reads rows of the piece into the columns from row `at` on.
	 * @returns how many, and where the first row that is not written plainly begins
	 */
	read(from: number, to: number, at: number): { rows: number; stop: number };
}

const LF = 10;
/** Bytes read at a time, more only for a single longer row. */
const PIECE = 1 << 18;
const SLOTS_BYTES = 65_536 * 24;
/** Labels as the kernel keeps them. */
const LABEL_BYTES = 16;
const ENTRY = 32;
const KINDS = { skipped: 0, number: 1, label: 2 };

/**
 * @param plan the column of each cell, null for cells that are not read
 * @returns null where there is no kernel
 */
export function plainRows(
	plan: readonly (Column | null)[],
	{ delimiter, decimal }: Dialect
): PlainRows | null {
	const kernel = newKernel();
	if (!kernel) return null;
	const cells = plan.length;
	const tens = kernel.keep(Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`)));
	const told = kernel.take(8);
	const text = kernel.take(LABEL_BYTES);
	const entries = kernel.take(ENTRY * cells);
	const mostRows = Math.ceil(PIECE / (2 * cells)) + 1;
	const columns = plan.map((column, cell) => {
		const out = kernel.take(column ? (column.numbers ? 8 : 4) * mostRows : 0);
		const table = kernel.take(column?.labels ? SLOTS_BYTES : 0);
		const kind = !column ? KINDS.skipped : column.numbers ? KINDS.number : KINDS.label;
		kernel.int32(entries + ENTRY * cell, 3).set([kind, out, table]);
		const { factor = 1, divisor = 1 } = column?.spec ?? {};
		kernel.float64(entries + ENTRY * cell + 16, 2).set([factor, divisor]);
		return { column, out, table, known: 0 };
	});
	const room = kernel.take(PIECE);
	const encoder = new TextEncoder();

	/** Labels first seen since, but for those longer than the kernel keeps. */
	function learn(): void {
		for (const state of columns) {
			const labels = state.column?.labels?.labels ?? [];
			for (; state.known < labels.length; state.known++) {
				const bytes = encoder.encode(labels[state.known]);
				if (bytes.length === 0 || bytes.length > LABEL_BYTES || bytes.includes(0)) continue;
				const at = kernel?.bytes(text, LABEL_BYTES);
				at?.fill(0).set(bytes);
				kernel?.call.addLabel(state.table, text, state.known);
			}
		}
	}

	return {
		lay(bytes, from) {
			const whole = bytes.subarray(from, from + PIECE);
			const cut = bytes.length - from <= PIECE ? whole.length : whole.lastIndexOf(LF) + 1;
			if (cut === 0) return bytes.indexOf(LF, from) + 1 - from;
			kernel.bytes(room, cut).set(whole.subarray(0, cut));
			return cut;
		},
		read(from, to, at) {
			if (to > PIECE) return { rows: 0, stop: from };
			learn();
			kernel.call.parseRows(
				...[room + from, room + to, entries, cells],
				...[delimiter.charCodeAt(0), decimal.charCodeAt(0), tens, told]
			);
			const [rows, stop] = kernel.int32(told, 2);
			for (const { column, out } of columns) {
				(column?.numbers ?? column?.ids)?.reserve(at + rows);
				column?.numbers?.values.set(kernel.float64(out, rows), at);
				column?.ids?.values.set(kernel.int32(out, rows), at);
			}
			return { rows, stop: stop - room };
		}
	};
}
