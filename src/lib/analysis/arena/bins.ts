import { isOneDimensional, type Arena } from './arena';
import { pieceAt } from './metric';

/**
 * How an arena is cut into bins. Bins are half open, [edge, next edge); the last also takes its
 * right edge. Bin k of a row begins at k · binCm, and its centre is half a bin further, also where
 * the arena ends inside it. In two dimensions bins are row-major, y upward: bin = row · binsX + column.
 * On a tree every piece is cut on its own, so that no bin spans a junction.
 */
export interface Bins {
	readonly dimensions: 1 | 2;
	readonly binCm: number;
	readonly binsX: number;
	readonly binsY: number;
	readonly count: number;
	readonly isRing: boolean;
	/** binsX + 1 edges. */
	readonly edgesXCm: Float64Array;
	readonly edgesYCm: Float64Array | null;
	/** Centre of every bin, length `count`. */
	readonly centreXCm: Float64Array;
	/** NaN in one dimension. */
	readonly centreYCm: Float64Array;
	/** Bin of a place inside the arena, −1 for NaN; places beyond an edge take the bin at that edge. */
	readonly of: (xCm: number, yCm: number) => number;
}

/** Guards a division that lands a rounding error above a whole number of bins. */
const SLACK = 1e-9;
const MOST_BINS = 250_000;

/**
 * Cuts an arena into bins.
 * @throws RangeError binCm not above 0, larger than the arena, or more than 250,000 bins
 */
export function binsOf(arena: Arena, binCm: number): Bins {
	if (!(binCm > 0)) throw new RangeError(`bin width must be above 0 cm, got ${binCm}`);
	const bins = arena.kind === 'tree' ? treeBins(arena, binCm) : gridBins(arena, binCm);
	if (bins.count < 2) throw new RangeError(`bins of ${binCm} cm leave fewer than two in the arena`);
	return bins;
}

function binsAlong(lengthCm: number, binCm: number): number {
	return Math.max(1, Math.ceil(lengthCm / binCm - SLACK));
}

function edges(count: number, binCm: number): Float64Array {
	return Float64Array.from({ length: count + 1 }, (_, k) => k * binCm);
}

function gridBins(arena: Exclude<Arena, { kind: 'tree' }>, binCm: number): Bins {
	const isFlat = !isOneDimensional(arena);
	const widthCm =
		arena.kind === 'rectangle'
			? arena.widthCm
			: arena.kind === 'disc'
				? arena.diameterCm
				: arena.lengthCm;
	const heightCm = arena.kind === 'rectangle' ? arena.heightCm : isFlat ? widthCm : binCm;
	const binsX = binsAlong(widthCm, binCm);
	const binsY = isFlat ? binsAlong(heightCm, binCm) : 1;
	const count = binsX * binsY;
	if (count > MOST_BINS) throw new RangeError(`${count} bins are too many; use wider bins`);
	const clip = (value: number, bins: number) =>
		Math.max(0, Math.min(bins - 1, Math.floor(value / binCm)));
	return {
		dimensions: isFlat ? 2 : 1,
		binCm,
		binsX,
		binsY,
		count,
		isRing: arena.kind === 'ring',
		edgesXCm: edges(binsX, binCm),
		edgesYCm: isFlat ? edges(binsY, binCm) : null,
		centreXCm: Float64Array.from({ length: count }, (_, k) => ((k % binsX) + 0.5) * binCm),
		centreYCm: Float64Array.from({ length: count }, (_, k) =>
			isFlat ? (Math.floor(k / binsX) + 0.5) * binCm : NaN
		),
		of: isFlat
			? (xCm, yCm) => (Number.isNaN(xCm + yCm) ? -1 : clip(yCm, binsY) * binsX + clip(xCm, binsX))
			: (xCm) => (Number.isNaN(xCm) ? -1 : clip(xCm, binsX))
	};
}

function treeBins(arena: Extract<Arena, { kind: 'tree' }>, binCm: number): Bins {
	const first: number[] = [];
	const starts: number[] = [];
	for (const { startCm, lengthCm } of arena.pieces) {
		first.push(starts.length);
		const count = binsAlong(lengthCm, binCm);
		for (let k = 0; k < count; k++) starts.push(startCm + k * binCm);
	}
	const count = starts.length;
	if (count > MOST_BINS) throw new RangeError(`${count} bins are too many; use wider bins`);
	const edgesXCm = Float64Array.from([...starts, arena.lengthCm]);
	return {
		dimensions: 1,
		binCm,
		binsX: count,
		binsY: 1,
		count,
		isRing: false,
		edgesXCm,
		edgesYCm: null,
		centreXCm: Float64Array.from({ length: count }, (_, k) => (edgesXCm[k] + edgesXCm[k + 1]) / 2),
		centreYCm: new Float64Array(count).fill(NaN),
		of: (xCm) => {
			if (Number.isNaN(xCm)) return -1;
			const piece = pieceAt(arena.pieces, xCm);
			const last = (piece + 1 < first.length ? first[piece + 1] : count) - 1;
			const within = Math.floor((xCm - arena.pieces[piece].startCm) / binCm);
			return Math.max(first[piece], Math.min(last, first[piece] + within));
		}
	};
}
