import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { channelFlags, needsHardwareCheck, PLATED_WIRE } from './channel-flags';
import { hasChanged } from './impedance-change';
import { impedanceSpread } from './impedance-spread';

const reference = () =>
	referenceCase<
		{
			kOhm: number[];
			shortBelow: number;
			openAbove: number;
			targetLow: number;
			targetHigh: number;
		},
		{ flag: string[]; medianKohm: number; robustZ: number[] }
	>('18_misc.json', 'impedance_flags');

describe('channelFlags', () => {
	it('agrees with the reference on every channel', () => {
		const { input, expected } = reference();
		const limits = {
			shortBelowKohm: input.shortBelow,
			openAboveKohm: input.openAbove,
			lowBelowKohm: input.targetLow,
			highAboveKohm: input.targetHigh
		};
		expect(limits).toEqual(PLATED_WIRE);
		expect(channelFlags(input.kOhm, limits)).toEqual(expected.flag);
	});

	it('takes a reading on a limit for within it', () => {
		expect(channelFlags([50, 150, 400, 3000])).toEqual(['low', 'ok', 'ok', 'high']);
		expect(channelFlags([49.9, 149.9, 400.1, 3000.1])).toEqual(['short', 'low', 'high', 'open']);
	});

	it('calls low channels bridged that read within a twentieth of each other', () => {
		expect(channelFlags([100, 104, 210, 220])).toEqual(['bridged', 'bridged', 'ok', 'ok']);
		expect(channelFlags([100, 106, 210, 210])).toEqual(['low', 'low', 'ok', 'ok']);
		expect(channelFlags([52, 49.8, 210, 210])).toEqual(['bridged', 'short', 'ok', 'ok']);
	});

	it('says nothing about a channel that was not read', () => {
		expect(channelFlags([NaN, 0, -3, 100])).toEqual(['unknown', 'unknown', 'unknown', 'low']);
		expect(channelFlags([])).toEqual([]);
	});

	it('refuses limits out of order', () => {
		expect(() => channelFlags([1], { ...PLATED_WIRE, lowBelowKohm: 500 })).toThrow(RangeError);
		expect(() => channelFlags([1], { ...PLATED_WIRE, shortBelowKohm: 200 })).toThrow(RangeError);
		expect(() => channelFlags([1], { ...PLATED_WIRE, openAboveKohm: NaN })).toThrow(RangeError);
	});
});

describe('needsHardwareCheck', () => {
	it('asks for it from two broken channels on, whatever broke them', () => {
		expect(needsHardwareCheck(['short', 'ok', 'ok', 'high'])).toBe(false);
		expect(needsHardwareCheck(['short', 'open', 'ok', 'ok'])).toBe(true);
		expect(needsHardwareCheck(['bridged', 'bridged', 'ok', 'ok'])).toBe(true);
		expect(needsHardwareCheck(['low', 'high', 'unknown', 'low'])).toBe(false);
	});
});

describe('impedanceSpread', () => {
	it('agrees with numpy medians of log₁₀', () => {
		const { input, expected, tol } = reference();
		const got = impedanceSpread(input.kOhm);
		expect(Math.abs(got.medianKohm - expected.medianKohm)).toBeLessThan(tol);
		expect(worstDifference(got.robustZ, expected.robustZ)).toBeLessThan(tol);
	});

	it('does not depend on the unit: a factor on all readings moves no z', () => {
		const { input } = reference();
		const ohm = impedanceSpread(input.kOhm.map((reading) => reading * 1000));
		const z = [...impedanceSpread(input.kOhm).robustZ];
		expect(worstDifference(ohm.robustZ, z)).toBeLessThan(1e-9);
	});

	it('leaves unknown readings out and gives no z without a spread', () => {
		const got = impedanceSpread([100, NaN, 1000, 0]);
		expect(got.medianKohm).toBeCloseTo(Math.sqrt(1e5), 9);
		expect(
			worstDifference(got.robustZ, [-0.6744897501960817, null, 0.6744897501960817, null])
		).toBeLessThan(1e-12);
		expect([...impedanceSpread([200, 200, 200, 900]).robustZ]).toEqual([NaN, NaN, NaN, NaN]);
		expect(impedanceSpread([]).medianKohm).toBeNaN();
	});
});

describe('hasChanged', () => {
	it('sees more than a factor of two, up or down', () => {
		expect(hasChanged(200, 400)).toBe(false);
		expect(hasChanged(200, 401)).toBe(true);
		expect(hasChanged(401, 200)).toBe(true);
		expect(hasChanged(200, 99)).toBe(true);
	});

	it('says nothing when either reading is unknown', () => {
		expect(hasChanged(NaN, 200)).toBe(false);
		expect(hasChanged(200, 0)).toBe(false);
	});
});
