import { newKernel, type Kernel } from '../kernel/kernel';
import type { KeptTime } from './kept-time';

/** Bins and shifts laid down in a kernel's memory. */
export interface KernelShifts {
	readonly kernel: Kernel;
	readonly binTwice: number;
	readonly shifts: number;
	/** Shifts computed: four at a time, so up to three more than asked for. */
	readonly computed: number;
	/** Room for counts of four shifts side by side. */
	readonly counts: number;
	/** Lays down the spikes of a unit. */
	readonly spikes: (cells: Int32Array) => { at: number; count: number };
}

/**
 * Lays bins and shifts down for the compiled kernel.
 * @param most largest number of spikes of a unit
 * @returns null where there is no kernel, or more bins than it counts
 */
export function kernelShifts(
	kept: Pick<KeptTime, 'binTwice'>,
	shifts: Int32Array,
	bins: number,
	most: number
): KernelShifts | null {
	const { binTwice } = kept;
	const kernel = binTwice instanceof Uint16Array ? newKernel() : null;
	if (!kernel || !(binTwice instanceof Uint16Array)) return null;
	const computed = Math.ceil(shifts.length / 4) * 4;
	const padded = new Int32Array(computed);
	padded.set(shifts);
	const room = kernel.take(4 * most);
	return {
		kernel,
		binTwice: kernel.keep(binTwice),
		shifts: kernel.keep(padded),
		computed,
		counts: kernel.take(16 * bins),
		spikes: (cells) => {
			const offsets = kernel.int32(room, cells.length);
			for (let k = 0; k < cells.length; k++) offsets[k] = 2 * cells[k];
			return { at: room, count: cells.length };
		}
	};
}
