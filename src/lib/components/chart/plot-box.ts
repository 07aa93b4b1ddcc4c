/** Where things go inside a plot, in pixels of its SVG. */
export interface PlotBox {
	width: number;
	height: number;
	left: number;
	right: number;
	top: number;
	bottom: number;
}

export interface Margins {
	top: number;
	right: number;
	bottom: number;
	left: number;
}

/** How a plot is read with pointer or arrow keys. */
export interface PlotReader {
	count: number;
	/** The point nearest to a place in the SVG; −1 for none. */
	nearest: (x: number, y: number, box: PlotBox) => number;
	/** All figures of a point, in words. */
	say: (index: number) => string;
}

export function plotBox(width: number, height: number, margins: Margins): PlotBox {
	return {
		width,
		height,
		left: margins.left,
		right: Math.max(margins.left + 1, width - margins.right),
		top: margins.top,
		bottom: Math.max(margins.top + 1, height - margins.bottom)
	};
}

/** Index of the value nearest to x in ascending values; −1 when there are none. */
export function nearestIndex(values: ArrayLike<number>, x: number): number {
	let best = -1;
	let distance = Infinity;
	for (let i = 0; i < values.length; i++) {
		const here = Math.abs(values[i] - x);
		if (here < distance) [best, distance] = [i, here];
	}
	return best;
}

/** Point an arrow key leads to; null for keys that are not the plot's. */
export function pointAfterKey(key: string, at: number | null, count: number): number | null {
	if (count === 0) return null;
	const here = at ?? -1;
	if (key === 'ArrowRight' || key === 'ArrowUp') return Math.min(count - 1, here + 1);
	if (key === 'ArrowLeft' || key === 'ArrowDown') return Math.max(0, here - 1);
	if (key === 'PageUp') return Math.min(count - 1, here + 10);
	if (key === 'PageDown') return Math.max(0, here - 10);
	if (key === 'Home') return 0;
	if (key === 'End') return count - 1;
	return null;
}
