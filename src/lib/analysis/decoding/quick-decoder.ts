import { newKernel } from '../kernel/kernel';
import { addCounts, unitRoom } from '../maps/counts-of-units';
import type { Separable } from '../maps/separable';
import type { Smoother } from '../maps/smoother';
import type { TimedSpikes } from '../spikes/timed-spikes';
import { TILE, tilesOf } from './tiles';
import { windowEntries } from './window-entries';
import { firstOfFold, foldStart, type WindowsFromZero } from './windows-from-zero';

/** A day to be decoded: where the animal was, and when which unit fired. */
export interface QuickDay extends WindowsFromZero {
	readonly tS: Float64Array;
	/** Bin of each sample. */
	readonly bin: Int32Array;
	/** Seconds a sample stands for. */
	readonly sampleS: number;
	readonly spikes: TimedSpikes;
	readonly smooth: Smoother & { readonly separable: Separable };
	readonly centreXCm: Float64Array;
	readonly centreYCm: Float64Array;
	/** Rates are floored here. */
	readonly leastHz: number;
}

/** Answers for the windows of some folds. */
export interface QuickAnswer {
	readonly firstWindow: number;
	readonly bin: Int32Array;
	readonly meanXCm: Float32Array;
	readonly meanYCm: Float32Array;
}

/** Windows decoded at a time. */
const BLOCK = 512;
const NOWHERE = -1e30;

/** How many numbers counts of [bin][unit] are. */
export function quickRoom({ smooth, spikes }: Pick<QuickDay, 'smooth' | 'spikes'>): number {
	return smooth.separable.binsX * smooth.separable.binsY * unitRoom(spikes.units);
}

/**
 * Adds the spikes of some folds to counts of [bin][unit]. `quickDecode` wants the counts of all
 * folds, in as many parts as one likes, so the counting can be shared among threads as well.
 */
export function quickCounts(
	day: QuickDay,
	fromFold: number,
	toFold: number,
	counts: Int32Array
): void {
	const offset = offsets(day.bin, unitRoom(day.spikes.units));
	const [from, to] = [fromFold, toFold].map((fold) => firstOfFold(day, day.spikes.timeS, fold));
	addCounts(counts, day.tS, offset, day.spikes, from, to);
}

/**
 * Decodes windows fold by fold with maps from the other folds, in single precision and leaving out
 * places that cannot matter: the best bin (flat prior over bins visited in training) and the mean
 * of the posterior, whose lost mass is below 1e-5. For a quick look at large days; the session's own
 * figures come from `decodeWindows`. Any part of the folds may be asked of any thread.
 * @param parts counts of [bin][unit] that add up to those of all folds
 * @returns null where there is no kernel
 * Cost: O(spikes) and, per window, spiking units · places that matter.
 */
export function quickDecode(
	day: QuickDay,
	parts: readonly Int32Array[],
	fromFold: number,
	toFold: number
): QuickAnswer | null {
	const kernel = newKernel();
	if (!kernel) return null;
	const { tS, bin, spikes, smooth, windowS } = day;
	const { binsX, binsY, weights } = smooth.separable;
	const bins = binsX * binsY;
	const units = unitRoom(spikes.units);
	const tiles = tilesOf(binsX, binsY);
	const places = tiles.bin.length;
	const paddedTiles = places / TILE;
	const folds = Array.from({ length: toFold - fromFold }, (_, f) => {
		const ends = (timeS: Float64Array) =>
			[0, 1].map((next) => firstOfFold(day, timeS, fromFold + f + next));
		const [start, stop] = [0, 1].map((next) => foldStart(day, fromFold + f + next));
		return { start, stop, samples: ends(tS), spikes: ends(spikes.timeS) };
	});
	const mostSpikes = Math.max(...folds.map((fold) => fold.spikes[1] - fold.spikes[0]));
	const firstWindow = foldStart(day, fromFold);
	const count = foldStart(day, toFold) - firstWindow;

	const reach = (weights.length - 1) / 2;
	const reachY = binsY > 1 ? reach : 0;
	const half = kernel.keep(Float32Array.from(weights.subarray(reach)));
	const row = kernel.take(16 * (binsX + 2 * reach));
	const rows = kernel.take(16 * binsX * (binsY + 2 * reachY));
	const map = kernel.take(16 * bins);
	const all = kernel.take(4 * units * bins);
	const own = kernel.take(4 * units * bins);
	const perSecond = kernel.take(4 * bins);
	const slotOf = new Int32Array(bins);
	tiles.bin.forEach((k, place) => {
		if (k >= 0) slotOf[k] = 4 * (Math.floor(place / TILE) * units * TILE + (place % TILE));
	});
	const slot = kernel.keep(slotOf);
	const table = kernel.take(4 * places * units);
	const totalHz = kernel.take(8 * bins);
	const bounds = kernel.take(4 * paddedTiles * units);
	const constants = kernel.take(4 * places);
	const tops = kernel.take(4 * paddedTiles);
	const at = (centre: Float64Array) =>
		Float32Array.from(tiles.bin, (k) => (k < 0 || Number.isNaN(centre[k]) ? 0 : centre[k]));
	const xCm = kernel.keep(at(day.centreXCm));
	const yCm = kernel.keep(at(day.centreYCm));
	const binOf = kernel.keep(tiles.bin);
	const first = kernel.take(4 * (count + 1));
	const entries = kernel.take(8 * mostSpikes);
	const scores = kernel.take(4 * BLOCK * paddedTiles);
	const lists = kernel.take(4 * BLOCK * paddedTiles);
	const lengths = kernel.take(4 * paddedTiles);
	const states = kernel.take(64 * BLOCK);
	const best = kernel.take(4 * count);
	const means = kernel.take(8 * count);

	const allCounts = kernel.int32(all, units * bins);
	for (const part of parts) for (let k = 0; k < part.length; k++) allCounts[k] += part[k];
	const binOffset = offsets(bin, units);
	const ownCounts = kernel.int32(own, units * bins);
	const occupancyS = new Float64Array(bins);
	for (let i = 0; i < bin.length; i++) occupancyS[bin[i]] += day.sampleS;
	const trainS = new Float64Array(bins);
	const smoothedS = new Float64Array(bins);

	for (const { start, stop, samples: sampleEnds, spikes: ends } of folds) {
		ownCounts.fill(0);
		addCounts(ownCounts, tS, binOffset, spikes, ends[0], ends[1]);
		trainS.set(occupancyS);
		for (let i = sampleEnds[0]; i < sampleEnds[1]; i++) trainS[bin[i]] -= day.sampleS;
		const isTrained = (k: number) => trainS[k] > day.sampleS / 2;
		smooth(trainS, smoothedS);
		const inverse = kernel.float32(perSecond, bins);
		for (let k = 0; k < bins; k++) inverse[k] = isTrained(k) ? 1 / smoothedS[k] : 0;
		kernel.call.tileRates(
			...[all, own, units, binsX, binsY, half, reach, reachY, perSecond, day.leastHz],
			...[slot, row, rows, map, table, totalHz]
		);
		kernel.call.tileBounds(table, tiles.count, units, bounds);
		const total = kernel.float64(totalHz, bins);
		const constant = kernel.float32(constants, places);
		const top = kernel.float32(tops, paddedTiles).fill(NOWHERE);
		for (let place = 0; place < places; place++) {
			const k = tiles.bin[place];
			constant[place] = k >= 0 && isTrained(k) ? -windowS * total[k] : NOWHERE;
			const tile = Math.floor(place / TILE);
			top[tile] = Math.max(top[tile], constant[place]);
		}
		windowEntries(
			spikes,
			ends[0],
			ends[1],
			start,
			windowS,
			kernel.int32(first, stop - start + 1),
			kernel.int32(entries, 2 * mostSpikes),
			kernel.float32(entries, 2 * mostSpikes)
		);
		for (let w = start; w < stop; w += BLOCK) {
			const windows = Math.min(BLOCK, stop - w);
			kernel.call.tiledDecode(
				...[first + 4 * (w - start), entries, windows, units, tiles.groups, table, constants],
				...[bounds, tops, xCm, yCm, binOf, scores, lists, lengths, states],
				...[best + 4 * (w - firstWindow), means + 8 * (w - firstWindow)]
			);
		}
	}
	const mean = kernel.float32(means, 2 * count);
	return {
		firstWindow,
		bin: kernel.int32(best, count).slice(),
		meanXCm: Float32Array.from({ length: count }, (_, w) => mean[2 * w]),
		meanYCm: Float32Array.from({ length: count }, (_, w) => mean[2 * w + 1])
	};
}

function offsets(bin: Int32Array, room: number): Int32Array {
	const out = new Int32Array(bin.length);
	for (let i = 0; i < bin.length; i++) out[i] = bin[i] * room;
	return out;
}
