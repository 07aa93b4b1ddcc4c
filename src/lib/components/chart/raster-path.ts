/**
 * One path of upright ticks. Spikes that fall on the same half pixel are drawn
 * once: a fast cell would otherwise send tens of thousands of ticks to the page.
 */
export function rasterPath(
	placesCm: ArrayLike<number>,
	x: (placeCm: number) => number,
	topPx: number,
	lengthPx: number
): string {
	const columns = new Set<number>();
	for (let i = 0; i < placesCm.length; i++) {
		if (!Number.isNaN(placesCm[i])) columns.add(Math.round(x(placesCm[i]) * 2) / 2);
	}
	return Array.from(columns, (column) => `M${column} ${topPx}v${lengthPx}`).join('');
}
