/**
 * Posteriors kept for looking at, row-major [kept window][bin], 0 where a place cannot be answered.
 * When all would not fit, every k-th window is kept.
 */
export interface PosteriorStore {
	readonly probabilities: Float32Array;
	/** Window of each kept row. */
	readonly window: Int32Array;
	readonly bins: number;
}

/** Room for the posteriors of one result: 24 million numbers, 96 MB. */
const MOST_CELLS = 24_000_000;

/** An empty store for `windows` posteriors over `bins` bins. */
export function posteriorStore(windows: number, bins: number): PosteriorStore {
	const every = Math.max(1, Math.ceil((windows * bins) / MOST_CELLS));
	const window = Int32Array.from({ length: Math.ceil(windows / every) }, (_, k) => k * every);
	return { probabilities: new Float32Array(window.length * bins), window, bins };
}

/** Row of a window in the store, −1 when it is not kept. */
export function rowOf(store: PosteriorStore, window: number): number {
	const every = store.window.length > 1 ? store.window[1] : 1;
	return window % every === 0 ? window / every : -1;
}
