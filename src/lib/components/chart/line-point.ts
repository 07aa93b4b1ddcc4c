/** One figure of a series, with the interval it is known to. */
export interface LinePoint {
	x: number;
	/** null where there are no data; the line breaks there. */
	y: number | null;
	interval?: readonly [number, number] | null;
	/** How many units, windows or laps it rests on. */
	n?: number;
}

/** A level drawn across the plot: chance, floor, threshold. */
export interface Reference {
	y: number;
	label: string;
}

/** Lowest and highest value that must be in view; a flat series still gets a height. */
export function valueDomain(points: LinePoint[], references: Reference[]): [number, number] {
	let low = 0;
	let high = Number.NEGATIVE_INFINITY;
	const see = (value: number | null) => {
		if (value === null || Number.isNaN(value)) return;
		low = Math.min(low, value);
		high = Math.max(high, value);
	};
	for (const point of points) {
		see(point.y);
		point.interval?.forEach(see);
	}
	for (const reference of references) see(reference.y);
	return high > low ? [low, high] : [low, low + 1];
}
