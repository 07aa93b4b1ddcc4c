import { scratchKernel } from '../kernel/kernel';

/**
 * What lies beyond the ends of a line of bins: nothing, its mirror image about the outer edge of the
 * last bin (… c b a | a b c …), or the other end.
 */
export type EdgeRule = 'zero' | 'reflect' | 'wrap';

/** Bin that stands at index k of an endless line, −1 for none. */
function beyond(k: number, count: number, edge: EdgeRule): number {
	if (k >= 0 && k < count) return k;
	if (edge === 'zero') return -1;
	const period = edge === 'wrap' ? count : 2 * count;
	const within = ((k % period) + period) % period;
	return within < count ? within : 2 * count - 1 - within;
}

/** Reads lines of `from`, writes them smoothed to `to`, which may be the same array. */
export type LineSmoother = (from: Float64Array, to: Float64Array) => void;

/**
 * A smoother of `lines` lines of `count` bins in a flat array; neighbouring bins lie `stride` apart,
 * the beginnings of neighbouring lines `between`.
 * Lines are copied into padded buffers, so the inner loop has no edge to test for, and four lines
 * are smoothed at once, so that each weight is read once for four bins.
 * @param weights odd length, symmetric
 * Cost: O(lines · count · weights).
 */
export function lineSmoother(
	{ count, lines, stride, between }: LineLayout,
	weights: Float64Array,
	edge: EdgeRule
): LineSmoother {
	const reach = (weights.length - 1) / 2;
	const half = weights.slice(reach);
	const width = count + 2 * reach;
	// Four lines side by side: bin k of line l stands at 4 k + l.
	const padded = new Float64Array(4 * width);
	const pads: { at: number; bin: number }[] = [];
	for (let at = 0; at < width; at++) {
		const isPad = at < reach || at >= reach + count;
		const bin = isPad ? beyond(at - reach, count, edge) : -1;
		if (bin >= 0) pads.push({ at: 4 * at, bin: 4 * (reach + bin) });
	}
	return (from, to) => {
		for (let line = 0; line < lines; line += 4) {
			const together = Math.min(4, lines - line);
			for (let l = 0; l < together; l++) {
				let at = (line + l) * between;
				for (let k = 4 * reach + l; k < 4 * (reach + count); k += 4, at += stride) {
					padded[k] = from[at];
				}
			}
			for (const { at, bin } of pads) padded.copyWithin(at, bin, bin + 4);
			for (let k = 0; k < count; k++) {
				const middle = 4 * (k + reach);
				let a = half[0] * padded[middle];
				let b = half[0] * padded[middle + 1];
				let c = half[0] * padded[middle + 2];
				let d = half[0] * padded[middle + 3];
				for (let j = 1, low = middle - 4, high = middle + 4; j <= reach; j++, low -= 4, high += 4) {
					const weight = half[j];
					a += weight * (padded[low] + padded[high]);
					b += weight * (padded[low + 1] + padded[high + 1]);
					c += weight * (padded[low + 2] + padded[high + 2]);
					d += weight * (padded[low + 3] + padded[high + 3]);
				}
				const at = line * between + k * stride;
				to[at] = a;
				if (together > 1) to[at + between] = b;
				if (together > 2) to[at + 2 * between] = c;
				if (together > 3) to[at + 3 * between] = d;
			}
		}
	};
}

/** Where the lines of a flat array lie. */
export interface LineLayout {
	readonly count: number;
	readonly lines: number;
	readonly stride: number;
	readonly between: number;
}

/** Smooths the rows and then the columns of a row-major grid; compiled where nothing lies beyond. */
export function gridSmoother(
	binsX: number,
	binsY: number,
	weights: Float64Array,
	edge: EdgeRule
): LineSmoother {
	const plain = plainGridSmoother(binsX, binsY, weights, edge);
	if (edge !== 'zero') return plain;
	const reach = (weights.length - 1) / 2;
	const half = weights.slice(reach);
	const width = Math.ceil(binsX / 8) * 8;
	return (from, to) => {
		const kernel = scratchKernel();
		if (!kernel) return plain(from, to);
		const row = kernel.take(8 * (width + 2 * reach));
		const rows = kernel.take(8 * width * (binsY + 2 * reach));
		const line = kernel.take(8 * width);
		const laid = kernel.keep(half);
		const grid = kernel.keep(from);
		kernel.call.smoothGrid(grid, binsX, binsY, laid, reach, row, rows, line);
		to.set(kernel.float64(grid, binsX * binsY));
	};
}

/** The same by `lineSmoother`; equal to the last bit. */
export function plainGridSmoother(
	binsX: number,
	binsY: number,
	weights: Float64Array,
	edge: EdgeRule
): LineSmoother {
	const rows = { count: binsX, lines: binsY, stride: 1, between: binsX };
	const columns = { count: binsY, lines: binsX, stride: binsX, between: 1 };
	const along = lineSmoother(rows, weights, edge);
	const across = lineSmoother(columns, weights, edge);
	return (from, to) => {
		along(from, to);
		across(to, to);
	};
}
