/** A point of the camera plane, cm. */
export interface Point {
	readonly xCm: number;
	readonly yCm: number;
}

/** A straight piece of a branched maze; `startCm` is where it begins on the common distance axis. */
export interface Piece {
	readonly from: number;
	readonly to: number;
	readonly startCm: number;
	readonly lengthCm: number;
}

/**
 * Where an animal may be. Lengths in cm. `straight`, `ring`, `polyline` and `tree` have one
 * dimension (distance along the track), `rectangle` and `disc` two. The lower left corner of a
 * rectangle, and of the square around a disc, is the origin.
 */
export type Arena =
	| { readonly kind: 'straight'; readonly lengthCm: number }
	| { readonly kind: 'ring'; readonly lengthCm: number }
	| { readonly kind: 'rectangle'; readonly widthCm: number; readonly heightCm: number }
	| { readonly kind: 'disc'; readonly diameterCm: number }
	| { readonly kind: 'polyline'; readonly lengthCm: number; readonly points: readonly Point[] }
	| {
			readonly kind: 'tree';
			readonly lengthCm: number;
			readonly nodes: readonly Point[];
			readonly pieces: readonly Piece[];
	  };

/** True where position is one distance along a track. */
export function isOneDimensional(
	arena: Arena
): arena is Exclude<Arena, { kind: 'rectangle' } | { kind: 'disc' }> {
	return arena.kind !== 'rectangle' && arena.kind !== 'disc';
}
