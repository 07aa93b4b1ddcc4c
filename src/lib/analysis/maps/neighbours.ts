import type { Arena } from '../arena/arena';
import type { Bins } from '../arena/bins';
import { pieceAt } from '../arena/metric';

/**
 * Bins that touch each bin. On a line the one before and after (the seam of a ring is joined, the
 * bins at a junction of a tree all touch); on a grid four, or eight with the diagonals.
 */
export function neighboursOf(arena: Arena, bins: Bins, withDiagonals: boolean): Int32Array[] {
	if (arena.kind === 'tree') return treeNeighbours(arena, bins);
	const { binsX, binsY, isRing, dimensions, count } = bins;
	return Array.from({ length: count }, (_, k) => {
		const column = k % binsX;
		const row = Math.floor(k / binsX);
		const near: number[] = [];
		for (let dy = dimensions === 2 ? -1 : 0; dy <= (dimensions === 2 ? 1 : 0); dy++) {
			for (let dx = -1; dx <= 1; dx++) {
				if ((dx === 0 && dy === 0) || (!withDiagonals && dx !== 0 && dy !== 0)) continue;
				const x = isRing ? (column + dx + binsX) % binsX : column + dx;
				const y = row + dy;
				if (x >= 0 && x < binsX && y >= 0 && y < binsY) near.push(y * binsX + x);
			}
		}
		return Int32Array.from(near);
	});
}

function treeNeighbours(arena: Extract<Arena, { kind: 'tree' }>, bins: Bins): Int32Array[] {
	const piece = Array.from(bins.centreXCm, (x) => pieceAt(arena.pieces, x));
	const atNode = arena.nodes.map((_, node) =>
		piece.flatMap((p, bin) => {
			const isFirst = piece[bin - 1] !== p && arena.pieces[p].from === node;
			const isLast = piece[bin + 1] !== p && arena.pieces[p].to === node;
			return isFirst || isLast ? [bin] : [];
		})
	);
	return piece.map((p, bin) => {
		const near = new Set<number>();
		if (piece[bin - 1] === p) near.add(bin - 1);
		if (piece[bin + 1] === p) near.add(bin + 1);
		for (const meeting of atNode) if (meeting.includes(bin)) meeting.forEach((b) => near.add(b));
		near.delete(bin);
		return Int32Array.from([...near].sort((a, b) => a - b));
	});
}
