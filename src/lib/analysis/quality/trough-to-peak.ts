import { bestChannel, type Waveform } from './best-channel';

/**
 * Spike width: time from the trough of the mean waveform to the highest sample after it, on the
 * channel where the unit is largest. Spikes point down.
 * @param samplingHz samples per second of the waveform
 * @returns ms; NaN for a missing or flat waveform, or when the trough is its last sample
 * @throws RangeError samplingHz not above 0
 * Resolution is one sample; nothing is interpolated.
 */
export function troughToPeakMs(waveform: Waveform, samplingHz: number): number {
	if (!(samplingHz > 0)) throw new RangeError(`sampling must be above 0 Hz, got ${samplingHz}`);
	const best = bestChannel(waveform);
	if (!best || best.peakToPeakUv === 0) return NaN;
	const { uv } = best;
	let trough = 0;
	for (let i = 1; i < uv.length; i++) if (uv[i] < uv[trough]) trough = i;
	if (trough === uv.length - 1) return NaN;
	let peak = trough + 1;
	for (let i = peak + 1; i < uv.length; i++) if (uv[i] > uv[peak]) peak = i;
	return ((peak - trough) / samplingHz) * 1000;
}
