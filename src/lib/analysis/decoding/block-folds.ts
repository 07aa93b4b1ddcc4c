import { foldsAt } from './folds-at';
import type { Fold } from './folds';
import type { Windows } from './windows';

/** Shorter blocks are one pass, or part of one. */
const LEAST_BLOCK_S = 20;

/**
 * Contiguous blocks of at least `blockS` on the clock, each decoded with maps from all others. A
 * block starts at the first window that begins `blockS` or more after the block before began; what
 * is left at the end joins the last block.
 * @returns none when the windows do not last for two blocks
 * @throws RangeError blockS under 20 s
 */
export function blockFolds(windows: Windows, blockS = LEAST_BLOCK_S): Fold[] {
	if (!(blockS >= LEAST_BLOCK_S && Number.isFinite(blockS))) {
		throw new RangeError(`blocks must last ${LEAST_BLOCK_S} s or more, got ${blockS}`);
	}
	const { startS, lengthS } = windows;
	const begins: number[] = [];
	for (let w = 0; w < startS.length; w++) {
		if (w === 0 || startS[w] - startS[begins[begins.length - 1]] >= blockS) begins.push(w);
	}
	const last = begins[begins.length - 1];
	const lastS = startS[startS.length - 1] + lengthS - startS[last];
	if (lastS < blockS) begins.pop();
	return begins.length < 2 ? [] : foldsAt(windows, begins);
}
