import { bestChannel } from '../quality/best-channel';
import { fisherZ } from '../statistics/fisher-z';
import { pearson } from '../statistics/pearson';
import type { MatchUnit } from './match-unit';

/** What two units are compared by; NaN where it cannot be told, which counts for and against nothing. */
export const FEATURES = [
	'waveformZ',
	'logAmplitudeRatio',
	'correlogramZ',
	'logRateRatio',
	'depthUm'
] as const;
export type Feature = (typeof FEATURES)[number];
export type PairFeatures = Readonly<Record<Feature, number>>;

/**
 * Features of a pair of units: atanh of the correlation of their mean waveforms over all channels in
 * a row (scaling a waveform does not change it), log ratio of their amplitudes on their best
 * channels, atanh of the correlation of their autocorrelograms, log ratio of their rates, difference
 * of their depths. The ratios and the depth are later minus earlier.
 * Shape over the channels of a tetrode: Tolias et al. 2007; shape, autocorrelogram and rate together:
 * Fraser and Schwartz 2012.
 * @throws RangeError waveforms or autocorrelograms of different length
 */
export function pairFeatures(earlier: MatchUnit, later: MatchUnit): PairFeatures {
	const hasCorrelograms = earlier.correlogram.length > 0 && later.correlogram.length > 0;
	return {
		waveformZ: fisherZ(pearson(earlier.waveform.uv, later.waveform.uv)),
		logAmplitudeRatio: logRatio(amplitudeUv(later), amplitudeUv(earlier)),
		correlogramZ: hasCorrelograms ? fisherZ(pearson(earlier.correlogram, later.correlogram)) : NaN,
		logRateRatio: logRatio(later.rateHz, earlier.rateHz),
		depthUm: later.depthUm - earlier.depthUm
	};
}

function amplitudeUv({ waveform }: MatchUnit): number {
	return bestChannel(waveform)?.peakToPeakUv ?? NaN;
}

function logRatio(a: number, b: number): number {
	return a > 0 && b > 0 ? Math.log(a / b) : NaN;
}
