/** A canvas at the screen's own resolution, with one unit of drawing a CSS pixel. */
export function sharpContext(
	canvas: HTMLCanvasElement,
	widthPx: number,
	heightPx: number
): CanvasRenderingContext2D | null {
	const density = window.devicePixelRatio || 1;
	canvas.width = Math.round(widthPx * density);
	canvas.height = Math.round(heightPx * density);
	const context = canvas.getContext('2d');
	context?.scale(density, density);
	return context;
}

/** Puts one pixel a cell; the style sheet scales it up without smoothing. */
export function putPixels(
	canvas: HTMLCanvasElement,
	pixels: Uint8ClampedArray<ArrayBuffer>,
	columns: number,
	rows: number
): void {
	canvas.width = columns;
	canvas.height = rows;
	canvas.getContext('2d')?.putImageData(new ImageData(pixels, columns, rows), 0, 0);
}
