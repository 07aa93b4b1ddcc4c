import { shiftTest } from '../../lib/analysis/maps/shift-test';
import { shiftedRawInformation } from '../../lib/analysis/maps/shifted-raw-information';
import { median } from '../../lib/analysis/statistics/quantile';
import { samplesByUnit } from '../../lib/analysis/spikes/samples-by-unit';
import type { Crew } from './crew';
import { binsOfSamples, share, spikesOfDay } from './ground';
import type { BenchDay } from './simulate-day';

const SHIFTS = 500;
/** Shifts keep this far from none, s. */
const LEAST_S = 20;

export interface ShiftInput {
	from: number;
	to: number;
}

export interface ShiftOutput {
	bits: Float64Array;
	p: Float64Array;
}

/** Information of some units and its p among shifted spikes; the first shift is none. */
export function shiftUnits(day: BenchDay, { from, to }: ShiftInput): ShiftOutput {
	const { size, tS } = day;
	const bin = binsOfSamples(day);
	const binTwice = new Uint16Array(2 * bin.length);
	binTwice.set(bin);
	binTwice.set(bin, bin.length);
	const occupancyS = new Float64Array(size.binsX * size.binsY);
	for (let i = 0; i < bin.length; i++) occupancyS[bin[i]] += 1 / size.hz;
	const least = LEAST_S * size.hz;
	const shifts = Int32Array.from({ length: SHIFTS + 1 }, (_, k) =>
		k === 0 ? 0 : least + (((k - 1) * 2654435761) % (tS.length - 2 * least))
	);
	const cells = samplesByUnit(spikesOfDay(day), tS, from, to);
	const most = cells.reduce((top, { length }) => Math.max(top, length), 0);
	const figures = shiftedRawInformation({ binTwice }, shifts, occupancyS, most);
	const bits = new Float64Array(cells.length);
	const p = cells.map((own, u) => {
		const values = figures(own);
		bits[u] = values[0];
		return shiftTest(values[0], values.subarray(1)).p;
	});
	return { bits, p: Float64Array.from(p) };
}

/** Unsmoothed information of every unit against 500 circular shifts. */
export async function shiftStep(
	crew: Crew,
	day: BenchDay
): Promise<{ bitsMedian: number; significant: number }> {
	const parts = await crew.all('shift-units', (thread) =>
		share(day.size.units, thread, crew.threads)
	);
	return {
		bitsMedian: median(parts.flatMap(({ bits }) => [...bits])),
		significant: parts.flatMap(({ p }) => [...p]).filter((p) => p < 0.05).length
	};
}
