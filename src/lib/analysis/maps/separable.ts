/** A smoothing that runs along rows and then along columns with the same weights, nothing beyond. */
export interface Separable {
	readonly binsX: number;
	/** 1 on a line. */
	readonly binsY: number;
	/** Odd length, symmetric. */
	readonly weights: Float64Array;
	/** A row closes on itself. */
	readonly isRing: boolean;
}
