import type { Fold } from './folds';

/**
 * Widens the span of time that each fold keeps from its training data, on both sides of the test
 * block: what the animal does and how a cell bursts outlasts the edge of a block.
 * @param gapS 0 or more; 1 to 2 s is usual
 * @returns new folds over the same windows
 * @throws RangeError gapS negative or not finite
 */
export function withGap(folds: readonly Fold[], gapS: number): Fold[] {
	if (!(gapS >= 0 && Number.isFinite(gapS))) {
		throw new RangeError(`the gap must be 0 s or more, got ${gapS}`);
	}
	return folds.map((fold) => ({
		...fold,
		startS: fold.startS - gapS,
		stopS: fold.stopS + gapS
	}));
}
