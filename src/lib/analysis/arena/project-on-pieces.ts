import type { Arena, Point } from './arena';

/** Foot of a point on a track made of straight pieces. */
export interface Foot {
	readonly piece: number;
	/** Distance along the common axis, cm. */
	readonly alongCm: number;
	/** Distance from the track, cm. */
	readonly offCm: number;
}

interface Segment {
	readonly from: Point;
	readonly to: Point;
	readonly startCm: number;
	readonly lengthCm: number;
}

/** The straight pieces of a polyline or tree with their ends. */
export function segmentsOf(
	arena: Extract<Arena, { kind: 'polyline' } | { kind: 'tree' }>
): readonly Segment[] {
	if (arena.kind === 'tree') {
		return arena.pieces.map(({ from, to, startCm, lengthCm }) => ({
			from: arena.nodes[from],
			to: arena.nodes[to],
			startCm,
			lengthCm
		}));
	}
	let startCm = 0;
	return arena.points.slice(1).map((to, i) => {
		const from = arena.points[i];
		const lengthCm = Math.hypot(to.xCm - from.xCm, to.yCm - from.yCm);
		const segment = { from, to, startCm, lengthCm };
		startCm += lengthCm;
		return segment;
	});
}

/** Nearest point of one segment; the foot never leaves its ends. */
export function projectOnSegment(segment: Segment, xCm: number, yCm: number): Omit<Foot, 'piece'> {
	const dx = segment.to.xCm - segment.from.xCm;
	const dy = segment.to.yCm - segment.from.yCm;
	const share =
		((xCm - segment.from.xCm) * dx + (yCm - segment.from.yCm) * dy) /
		(segment.lengthCm * segment.lengthCm);
	const t = Math.max(0, Math.min(1, share));
	return {
		alongCm: segment.startCm + t * segment.lengthCm,
		offCm: Math.hypot(xCm - segment.from.xCm - t * dx, yCm - segment.from.yCm - t * dy)
	};
}

/** Nearest foot over all segments; a tie goes to the lower index. */
export function projectOnPieces(segments: readonly Segment[], xCm: number, yCm: number): Foot {
	let best: Foot = { piece: -1, alongCm: NaN, offCm: Infinity };
	for (let piece = 0; piece < segments.length; piece++) {
		const foot = projectOnSegment(segments[piece], xCm, yCm);
		if (foot.offCm < best.offCm) best = { piece, ...foot };
	}
	return best;
}
