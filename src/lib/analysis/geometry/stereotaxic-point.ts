/**
 * A place in a right-handed stereotaxic frame, from bregma unless said otherwise. Also used for
 * directions, which have no unit.
 */
export interface StereotaxicPoint {
	/** Anterior is positive. */
	readonly apMm: number;
	/** Right is positive. */
	readonly mlMm: number;
	/** Down is positive. */
	readonly dvMm: number;
}

/** @throws RangeError a coordinate that is not a finite number; `what` names the point */
export function demandPoint(what: string, { apMm, mlMm, dvMm }: StereotaxicPoint): void {
	if (![apMm, mlMm, dvMm].every(Number.isFinite)) {
		throw new RangeError(`${what} needs three numbers, got ${apMm}, ${mlMm}, ${dvMm}`);
	}
}

export function plus(a: StereotaxicPoint, b: StereotaxicPoint): StereotaxicPoint {
	return { apMm: a.apMm + b.apMm, mlMm: a.mlMm + b.mlMm, dvMm: a.dvMm + b.dvMm };
}

/** The way from `from` to `to`. */
export function minus(to: StereotaxicPoint, from: StereotaxicPoint): StereotaxicPoint {
	return { apMm: to.apMm - from.apMm, mlMm: to.mlMm - from.mlMm, dvMm: to.dvMm - from.dvMm };
}

export function times(point: StereotaxicPoint, factor: number): StereotaxicPoint {
	return { apMm: point.apMm * factor, mlMm: point.mlMm * factor, dvMm: point.dvMm * factor };
}

export function lengthOf({ apMm, mlMm, dvMm }: StereotaxicPoint): number {
	return Math.hypot(apMm, mlMm, dvMm);
}
