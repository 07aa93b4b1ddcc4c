import type { Arena, Piece } from './arena';
import { ringStep } from './ring';

/** Distance in cm between two places; `y` is ignored where the arena has one dimension. */
export type Metric = (aX: number, aY: number, bX: number, bY: number) => number;

/**
 * The way an animal must go from one place to another: along the track on one-dimensional arenas
 * (the short way on a ring, through the junctions of a tree), in a straight line in the open.
 * NaN when either place is NaN.
 */
export function metricOf(arena: Arena): Metric {
	switch (arena.kind) {
		case 'straight':
		case 'polyline':
			return (aX, _aY, bX) => Math.abs(bX - aX);
		case 'ring':
			return (aX, _aY, bX) => Math.abs(ringStep(aX, bX, arena.lengthCm));
		case 'tree':
			return treeMetric(arena.nodes.length, arena.pieces);
		default:
			return (aX, aY, bX, bY) => Math.hypot(bX - aX, bY - aY);
	}
}

/** Index of the piece that holds a distance on the common axis; the last piece takes its end. */
export function pieceAt(pieces: readonly Piece[], alongCm: number): number {
	let piece = pieces.length - 1;
	while (piece > 0 && alongCm < pieces[piece].startCm) piece--;
	return piece;
}

function treeMetric(nodeCount: number, pieces: readonly Piece[]): Metric {
	const between = nodeDistances(nodeCount, pieces);
	return (aX, _aY, bX) => {
		if (Number.isNaN(aX) || Number.isNaN(bX)) return NaN;
		const pieceA = pieceAt(pieces, aX);
		const pieceB = pieceAt(pieces, bX);
		if (pieceA === pieceB) return Math.abs(bX - aX);
		const a = pieces[pieceA];
		const b = pieces[pieceB];
		const fromA = aX - a.startCm;
		const fromB = bX - b.startCm;
		const via = (endA: number, toA: number, endB: number, toB: number) =>
			toA + between[endA * nodeCount + endB] + toB;
		return Math.min(
			via(a.from, fromA, b.from, fromB),
			via(a.from, fromA, b.to, b.lengthCm - fromB),
			via(a.to, a.lengthCm - fromA, b.from, fromB),
			via(a.to, a.lengthCm - fromA, b.to, b.lengthCm - fromB)
		);
	};
}

/** Shortest ways between all junctions (Floyd 1962, Warshall 1962); O(nodes³), a few dozen at most. */
function nodeDistances(nodeCount: number, pieces: readonly Piece[]): Float64Array {
	const out = new Float64Array(nodeCount * nodeCount).fill(Infinity);
	for (let i = 0; i < nodeCount; i++) out[i * nodeCount + i] = 0;
	for (const { from, to, lengthCm } of pieces) {
		out[from * nodeCount + to] = Math.min(out[from * nodeCount + to], lengthCm);
		out[to * nodeCount + from] = out[from * nodeCount + to];
	}
	for (let via = 0; via < nodeCount; via++) {
		for (let i = 0; i < nodeCount; i++) {
			for (let j = 0; j < nodeCount; j++) {
				const round = out[i * nodeCount + via] + out[via * nodeCount + j];
				if (round < out[i * nodeCount + j]) out[i * nodeCount + j] = round;
			}
		}
	}
	return out;
}
