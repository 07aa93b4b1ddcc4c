import {
	halfCounts,
	halfMaps,
	halfRoom,
	type HalvedDay,
	type HalfMaps
} from '../../lib/analysis/maps/half-maps';
import { median } from '../../lib/analysis/statistics/quantile';
import type { Crew } from './crew';
import { binsOfSamples, share, smootherOfSize, spikesOfDay } from './ground';
import type { BenchDay } from './simulate-day';

function halved(day: BenchDay): HalvedDay {
	return {
		tS: day.tS,
		bin: binsOfSamples(day),
		sampleS: 1 / day.size.hz,
		spikes: spikesOfDay(day),
		smooth: smootherOfSize(day.size),
		blockS: 30,
		leastHz: 1e-3
	};
}

export interface CountMapsInput {
	from: number;
	to: number;
	/** Gets the counts. */
	counts: Int32Array;
}

/** Counts some of the spikes for maps of both halves. */
export function countMaps(day: BenchDay, { from, to, counts }: CountMapsInput): void {
	halfCounts(halved(day), from, to, counts);
}

export interface DrawMapsInput {
	from: number;
	to: number;
	counts: Int32Array[];
}

/** Maps of some units from the counts of all threads. */
export function drawMaps(day: BenchDay, { from, to, counts }: DrawMapsInput): HalfMaps | null {
	return halfMaps(halved(day), counts, from, to);
}

/** Rate maps of all units, and how alike the maps of even and odd 30 s blocks are. */
export async function mapStep(crew: Crew, day: BenchDay): Promise<{ splitHalfMedian: number }> {
	const room = halfRoom({ smooth: smootherOfSize(day.size), spikes: spikesOfDay(day) });
	const counts = Array.from(
		{ length: crew.threads },
		() => new Int32Array(new SharedArrayBuffer(4 * room))
	);
	await crew.all('count-maps', (thread) => ({
		...share(day.spikeS.length, thread, crew.threads),
		counts: counts[thread]
	}));
	const drawn = await crew.all('draw-maps', (thread) => ({
		...share(day.size.units, thread, crew.threads, 4),
		counts
	}));
	return { splitHalfMedian: median(drawn.flatMap((maps) => [...(maps?.splitHalfR ?? [])])) };
}
