import type { DecodingArrays, SessionArrays } from '$lib/analysis/session/analyse';
import { packArrays } from '$lib/schemas/named-arrays';

/** The path as drawn: single precision is a hundredth of a hair in cm and 0.1 ms over hours. */
export function pathPart({ tS, xCm, yCm, isUsed }: SessionArrays): Uint8Array {
	const from = tS[0];
	return packArrays({
		fromS: Float64Array.of(from),
		afterS: Float32Array.from(tS, (t) => t - from),
		xCm: Float32Array.from(xCm),
		yCm: Float32Array.from(yCm),
		isUsed
	});
}

/** Rate maps of all units, [unit][bin], and the time spent in each bin. */
export function mapsPart({ ratesHz, occupancyS }: SessionArrays): Uint8Array {
	return packArrays({
		ratesHz: Float32Array.from(ratesHz),
		occupancyS: Float32Array.from(occupancyS)
	});
}

/** Position samples of the spikes that count, unit after unit; `first[u]` is where unit u begins. */
export function spikesPart({ spikeSamples, isUsed }: SessionArrays): Uint8Array {
	const kept = spikeSamples.map((samples) =>
		samples.filter((sample) => sample >= 0 && isUsed[sample] === 1)
	);
	const first = new Int32Array(kept.length + 1);
	kept.forEach((samples, u) => (first[u + 1] = first[u] + samples.length));
	const sample = new Int32Array(first[kept.length]);
	kept.forEach((samples, u) => sample.set(samples, first[u]));
	return packArrays({ first, sample });
}

/** Decoded windows; each posterior in 255 steps of its own maximum, which is what a picture shows. */
export function decodingPart({ posterior, ...windows }: DecodingArrays): Uint8Array {
	const { probabilities, bins, window } = posterior;
	const shade = new Uint8Array(probabilities.length);
	for (let row = 0; row < window.length; row++) {
		let most = 0;
		for (let b = row * bins; b < (row + 1) * bins; b++) most = Math.max(most, probabilities[b]);
		if (most === 0) continue;
		for (let b = row * bins; b < (row + 1) * bins; b++) {
			shade[b] = Math.round((255 * probabilities[b]) / most);
		}
	}
	return packArrays({
		startS: windows.startS,
		trueXCm: Float32Array.from(windows.trueXCm),
		trueYCm: Float32Array.from(windows.trueYCm),
		trueBin: windows.trueBin,
		decodedBin: windows.decodedBin,
		errorCm: Float32Array.from(windows.errorCm),
		window,
		shade
	});
}
