/** Share of the travel between a day and the anchor's that is not trusted (common practice). */
const TRAVEL_DOUBT = 0.1;

/** A depth that was found, against what the turns add up to. */
export interface DepthAnchor {
	/** As found: a tip in histology, or a person's word at a known landmark. */
	readonly foundUm: number;
	/** Standard deviation of the found depth. */
	readonly foundSdUm: number;
	/** Depth folded from the turns on the day it was found. */
	readonly foldedUm: number;
	/** Found depths are multiplied by it first: what fixing and cutting took from the tissue. */
	readonly shrinkageFactor?: number;
}

/** Depths of a bundle after an anchor, one value per day. */
export interface AnchoredDepths {
	/** Added to every day; the turns and the pitch stay as they are. */
	readonly offsetUm: number;
	readonly depthUm: Float64Array;
	readonly sdUm: Float64Array;
}

/**
 * Shifts the depths of a bundle by one constant, so that the day of the anchor agrees with what was
 * found. The further a day's depth lies from the anchor's, the less it is known:
 * sd = √(σ_found² + (0.1 · |travel between them|)²).
 * @param foldedUm depth folded from the turns, per day, any order, along the track of the bundle;
 *                 NaN stays NaN
 * @throws RangeError a depth that is no number, foundSdUm negative, a factor not above 0
 * Cost: O(n).
 */
export function anchoredDepths(
	foldedUm: Float64Array,
	{ foundUm, foundSdUm, foldedUm: anchorUm, shrinkageFactor = 1 }: DepthAnchor
): AnchoredDepths {
	if (!Number.isFinite(foundUm) || !Number.isFinite(anchorUm)) {
		throw new RangeError(`an anchor needs two depths, got ${foundUm} and ${anchorUm}`);
	}
	if (!(foundSdUm >= 0)) throw new RangeError(`its deviation must be 0 or more, got ${foundSdUm}`);
	if (!(shrinkageFactor > 0 && Number.isFinite(shrinkageFactor))) {
		throw new RangeError(`the shrinkage factor must be above 0, got ${shrinkageFactor}`);
	}
	const offsetUm = foundUm * shrinkageFactor - anchorUm;
	return {
		offsetUm,
		depthUm: foldedUm.map((depth) => depth + offsetUm),
		sdUm: foldedUm.map((depth) => Math.hypot(foundSdUm, TRAVEL_DOUBT * (depth - anchorUm)))
	};
}
