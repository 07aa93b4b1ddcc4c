import { chance, type Chance } from './chance';
import type { DaySize } from './sizes';
import { tuning } from './tuning';
import { walk } from './walk';

/** A simulated recording day; in shared memory, so that threads need no copies. */
export interface BenchDay {
	readonly size: DaySize;
	readonly tS: Float64Array;
	readonly xCm: Float64Array;
	readonly yCm: Float64Array;
	/** Spikes in order of time. */
	readonly spikeS: Float64Array;
	readonly spikeUnit: Uint16Array;
}

/** Hz, averaged over units and time. */
const MEAN_HZ = 3;
/** Clock of the recorder, ticks a second. */
const TICKS = 30_000;

/** Simulates a day: the same seed gives the same numbers. */
export function simulateDay(size: DaySize, seed: number): BenchDay {
	const source = chance(seed);
	const path = walk(size, source);
	const rates = tuning(size, source);
	const point = gridPoints(size, path.xCm, path.yCm);
	scale(rates, point, size.units);
	const { spikeS, spikeUnit } = fire(size, rates, point, source);
	const samples = point.length;
	const tS = shared(Float64Array, samples);
	const xCm = shared(Float64Array, samples);
	const yCm = shared(Float64Array, samples);
	const seen = (cm: number, most: number) => {
		const jittered = Math.min(most - 0.01, Math.max(0, cm + 0.2 * source.normal()));
		return Math.round(jittered * 100) / 100;
	};
	for (let i = 0; i < samples; i++) {
		tS[i] = Math.round(i * (1 / size.hz) * 1e6) / 1e6;
		xCm[i] = seen(path.xCm[i], size.widthCm);
		yCm[i] = seen(path.yCm[i], size.heightCm);
	}
	return { size, tS, xCm, yCm, spikeS, spikeUnit };
}

function gridPoints(size: DaySize, xCm: Float64Array, yCm: Float64Array): Int32Array {
	const clip = (cm: number, most: number) => Math.min(most - 1, Math.max(0, Math.floor(cm)));
	return Int32Array.from(xCm, (x, i) => {
		const row = size.binsY === 1 ? 0 : clip(yCm[i], size.heightCm);
		return row * size.widthCm + clip(x, size.widthCm);
	});
}

/** Brings the mean rate over the path and the units to `MEAN_HZ`. */
function scale(rates: Float64Array, point: Int32Array, units: number): void {
	const visits = new Float64Array(rates.length / units);
	for (const p of point) visits[p]++;
	let sum = 0;
	for (let p = 0; p < visits.length; p++) {
		for (let u = 0; u < units; u++) sum += visits[p] * rates[p * units + u];
	}
	const factor = (MEAN_HZ * units * point.length) / sum;
	for (let k = 0; k < rates.length; k++) rates[k] *= factor;
}

/** Inhomogeneous Poisson spikes by time rescaling, on the recorder's clock, to the microsecond. */
function fire(
	{ units, hz }: DaySize,
	rates: Float64Array,
	point: Int32Array,
	source: Chance
): { spikeS: Float64Array; spikeUnit: Uint16Array } {
	const stepS = 1 / hz;
	const room = Math.ceil(point.length * stepS * units * MEAN_HZ * 1.05);
	const spikeS = shared(Float64Array, room);
	const spikeUnit = shared(Uint16Array, room);
	const left = Float64Array.from({ length: units }, source.wait);
	let count = 0;
	for (let i = 0; i < point.length; i++) {
		const now: [number, number][] = [];
		for (let u = 0; u < units; u++) {
			const due = rates[point[i] * units + u] * stepS;
			let used = left[u];
			while (used < due) {
				now.push([i * stepS + (used / due) * stepS, u]);
				used += source.wait();
			}
			left[u] = used - due;
		}
		now.sort((p, q) => p[0] - q[0]);
		for (const [timeS, unit] of now) {
			spikeS[count] = Math.round((Math.round(timeS * TICKS) / TICKS) * 1e6) / 1e6;
			spikeUnit[count++] = unit;
		}
	}
	return { spikeS: spikeS.subarray(0, count), spikeUnit: spikeUnit.subarray(0, count) };
}

function shared<T>(
	type: { new (buffer: SharedArrayBuffer): T; readonly BYTES_PER_ELEMENT: number },
	length: number
): T {
	return new type(new SharedArrayBuffer(length * type.BYTES_PER_ELEMENT));
}
