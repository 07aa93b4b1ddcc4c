import {
	quickCounts,
	quickDecode,
	quickRoom,
	type QuickAnswer,
	type QuickDay
} from '../../lib/analysis/decoding/quick-decoder';
import { median } from '../../lib/analysis/statistics/quantile';
import type { Crew } from './crew';
import { binsOfSamples, centresOf, share, smootherOfSize, spikesOfDay } from './ground';
import type { BenchDay } from './simulate-day';

const FOLDS = 10;

function planned(day: BenchDay, windowS: number): QuickDay {
	const { size, tS } = day;
	const centre = centresOf(size);
	return {
		tS,
		bin: binsOfSamples(day),
		sampleS: 1 / size.hz,
		spikes: spikesOfDay(day),
		smooth: smootherOfSize(size),
		centreXCm: centre.xCm,
		centreYCm: centre.yCm,
		// A whole number of windows may come out a rounding error short.
		windows: Math.floor((size.minutes * 60) / windowS + 1e-9),
		windowS,
		folds: FOLDS,
		leastHz: 1e-3
	};
}

export interface CountFoldsInput {
	windowS: number;
	from: number;
	to: number;
	/** Gets the counts. */
	counts: Int32Array;
}

/** Counts the spikes of some folds. */
export function countFolds(day: BenchDay, { windowS, from, to, counts }: CountFoldsInput): void {
	quickCounts(planned(day, windowS), from, to, counts);
}

export interface DecodeFoldsInput {
	windowS: number;
	from: number;
	to: number;
	counts: Int32Array[];
}

/** Decodes the windows of some folds from the counts of all threads. */
export function decodeFolds(day: BenchDay, input: DecodeFoldsInput): QuickAnswer | null {
	return quickDecode(planned(day, input.windowS), input.counts, input.from, input.to);
}

/** Decodes every window in ten folds; the error is that of the posterior mean. */
export async function decodeStep(
	crew: Crew,
	day: BenchDay,
	windowS: number
): Promise<{ medianErrorCm: number }> {
	const room = quickRoom({ smooth: smootherOfSize(day.size), spikes: spikesOfDay(day) });
	const counts = Array.from(
		{ length: crew.threads },
		() => new Int32Array(new SharedArrayBuffer(4 * room))
	);
	const folds = (thread: number) => ({ windowS, ...share(FOLDS, thread, crew.threads) });
	await crew.all('count-folds', (thread) => ({ ...folds(thread), counts: counts[thread] }));
	const parts = await crew.all('decode-folds', (thread) => ({ ...folds(thread), counts }));
	const last = parts[parts.length - 1];
	const errorCm = new Float64Array(last ? last.firstWindow + last.bin.length : 0);
	for (const part of parts) {
		if (!part) continue;
		for (let k = 0; k < part.bin.length; k++) {
			const window = part.firstWindow + k;
			const middle = Math.floor((window + 0.5) * windowS * day.size.hz);
			const i = Math.min(day.tS.length - 1, middle);
			errorCm[window] = Math.hypot(part.meanXCm[k] - day.xCm[i], part.meanYCm[k] - day.yCm[i]);
		}
	}
	return { medianErrorCm: median(errorCm) };
}
