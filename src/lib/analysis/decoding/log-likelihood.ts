import type { RateModel } from './rate-model';

/**
 * Adds Σ n ln f over some spiking units to `out`. The factorial and τⁿ of the Poisson law are the
 * same for every place and are left out; the silent part −τ Σ f is the caller's.
 * Four rows a pass: the sum is read and written once for four additions.
 * @param unit   units that spiked, entries from … to − 1
 * @param spikes their spikes
 */
export function addSpikeEvidence(
	out: Float64Array,
	model: RateModel,
	unit: Int32Array,
	spikes: Float64Array,
	from: number,
	to: number
): void {
	const places = out.length;
	const rows = model.logRates;
	let e = from;
	for (; e + 3 < to; e += 4) {
		const a = unit[e] * places;
		const b = unit[e + 1] * places;
		const c = unit[e + 2] * places;
		const d = unit[e + 3] * places;
		const na = spikes[e];
		const nb = spikes[e + 1];
		const nc = spikes[e + 2];
		const nd = spikes[e + 3];
		for (let p = 0; p < places; p++) {
			out[p] += na * rows[a + p] + nb * rows[b + p] + nc * rows[c + p] + nd * rows[d + p];
		}
	}
	for (; e < to; e++) {
		const row = unit[e] * places;
		const n = spikes[e];
		for (let p = 0; p < places; p++) out[p] += n * rows[row + p];
	}
}
