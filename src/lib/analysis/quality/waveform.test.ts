import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { bestChannel } from './best-channel';
import { robustSd } from '../statistics/robust-sd';
import { putativeType } from './putative-type';
import { SIGNAL_TO_NOISE, signalToNoise } from './signal-to-noise';
import { troughToPeakMs } from './trough-to-peak';

const waveformOf = (rows: number[][]) => ({
	uv: Float64Array.from(rows.flat()),
	channels: rows.length
});

describe('signal to noise and width', () => {
	it('equal numpy on four channels', () => {
		const { input, expected } = referenceCase<
			{ meanWaveformUv: number[][]; noiseUv: number[][]; samplingHz: number },
			{
				noiseSdMad: number[];
				bestChannel: number;
				peakToPeakUv: number[];
				snr: number;
				troughToPeakMs: number;
			}
		>('12_unit_quality.json', 'snr_and_width');
		const waveform = waveformOf(input.meanWaveformUv);
		const sd = Float64Array.from(input.noiseUv, (row) => robustSd(Float64Array.from(row)));
		expect(worstDifference(sd, expected.noiseSdMad)).toBeLessThan(1e-9);
		const got = signalToNoise(waveform, sd);
		expect(got).toMatchObject({ definition: SIGNAL_TO_NOISE, channel: expected.bestChannel });
		expect(got.peakToPeakUv).toBeCloseTo(expected.peakToPeakUv[expected.bestChannel], 9);
		expect(got.ratio).toBeCloseTo(expected.snr, 9);
		expect(troughToPeakMs(waveform, input.samplingHz)).toBeCloseTo(expected.troughToPeakMs, 9);
	});

	it('pass over a channel with a hole, and are undefined when none is whole', () => {
		const waveform = waveformOf([
			[0, NaN, 90],
			[0, -3, 1]
		]);
		expect(bestChannel(waveform)).toMatchObject({ channel: 1, peakToPeakUv: 4 });
		const none = waveformOf([[NaN, 1, 2]]);
		expect(signalToNoise(none, Float64Array.of(1))).toMatchObject({ channel: -1, ratio: NaN });
		expect(troughToPeakMs(none, 30000)).toBeNaN();
	});

	it('are undefined for a silent wire, and for a trough that ends the waveform', () => {
		expect(signalToNoise(waveformOf([[0, -3, 1]]), Float64Array.of(0)).ratio).toBeNaN();
		expect(troughToPeakMs(waveformOf([[5, 5, 5]]), 30000)).toBeNaN();
		expect(troughToPeakMs(waveformOf([[0, -1, -2]]), 30000)).toBeNaN();
	});

	it('refuse samples that do not divide by the channels, and a noise figure too few', () => {
		expect(() => bestChannel({ uv: new Float64Array(7), channels: 2 })).toThrow(RangeError);
		expect(() => signalToNoise(waveformOf([[1], [2]]), Float64Array.of(1))).toThrow(RangeError);
		expect(() => troughToPeakMs(waveformOf([[1, 2]]), 0)).toThrow(RangeError);
	});

	it('do not depend on an offset, and noise scales with its values', () => {
		const values = Float64Array.of(3, 1, 4, 1, 5, 9, 2, 6);
		const sd = robustSd(values);
		expect(robustSd(values.map((v) => 100 - 2 * v))).toBeCloseTo(2 * sd, 12);
		expect([...values]).toEqual([3, 1, 4, 1, 5, 9, 2, 6]);
		expect(robustSd(new Float64Array(0))).toBeNaN();
	});
});

describe('putativeType', () => {
	it('labels every listed pair of width and rate', () => {
		const { expected } = referenceCase<
			unknown,
			{ widthMs: number; meanHz: number; label: string }[]
		>('12_unit_quality.json', 'putative_type');
		const words = { principal: 'pyramidal', interneuron: 'interneuron', unclear: 'unclassified' };
		for (const { widthMs, meanHz, label } of expected) {
			expect(words[putativeType(widthMs, meanHz)]).toBe(label);
		}
	});

	it('is unclear for what was not measured, and follows bounds of the lab', () => {
		expect(putativeType(NaN, 1)).toBe('unclear');
		expect(putativeType(0.5, NaN)).toBe('unclear');
		const bounds = {
			principalMinWidthMs: 0.6,
			principalMaxHz: 5,
			interneuronMaxWidthMs: 0.55,
			interneuronMinHz: 0.5
		};
		expect(putativeType(0.5, 1, bounds)).toBe('interneuron');
	});
});
