/** How one axis of a camera picture becomes centimetres. */
export interface PixelScale {
	/** Centimetres per pixel; negative where centimetres grow as pixels fall. */
	readonly cmPerPx: number;
	/** Pixel that becomes 0 cm. */
	readonly zeroPx: number;
}

/**
 * The scale of one axis from two marks a known length apart. The first mark becomes 0 cm and the
 * second `lengthCm`; pictures count pixels downward, so give the lower mark first to have y upward.
 * @throws RangeError length not above 0, or both marks on one pixel
 */
export function pixelScale(firstPx: number, secondPx: number, lengthCm: number): PixelScale {
	if (!(lengthCm > 0 && Number.isFinite(lengthCm))) {
		throw new RangeError(`the length between the marks must be above 0 cm, got ${lengthCm}`);
	}
	const spanPx = secondPx - firstPx;
	if (!(Math.abs(spanPx) > 0 && Number.isFinite(spanPx))) {
		throw new RangeError(`the marks must lie apart, got pixels ${firstPx} and ${secondPx}`);
	}
	return { cmPerPx: lengthCm / spanPx, zeroPx: firstPx };
}

/**
 * Centimetres of pixels on one axis.
 * @returns new array; NaN stays NaN
 * Cost: O(n).
 */
export function pixelsToCm(px: Float64Array, { cmPerPx, zeroPx }: PixelScale): Float64Array {
	return px.map((value) => (value - zeroPx) * cmPerPx);
}
