import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { anchoredDepths } from './depth-anchor';
import { expectedLayers } from './expected-layers';
import { foldTurns } from './fold-turns';
import { LAYER_LANDMARKS } from './layer-landmarks';
import { pitchPerInch, SCREW_PITCHES } from './screw-pitches';
import { isTravelLow, travelLeft } from './travel-left';

describe('SCREW_PITCHES', () => {
	/** Our fine series is one row; the reference lists two of its sizes. */
	const ours = (name: string) =>
		name.includes('fine')
			? 'M1–M1.8 × 0.2 fine'
			: name.replace('00-90 UNF', '00-90').replace(/^(M[\d.]+)x/, '$1 × ');

	it('gives every pitch of the series, an inch being 25.4 mm exactly', () => {
		const told = [
			referenceCase<unknown, { pitch: Record<string, number> }>('00_checks.json', 'h1').expected
				.pitch,
			referenceCase<unknown, { micrometresPerTurn: Record<string, number> }>(
				'17_geometry.json',
				'pitch_table'
			).expected.micrometresPerTurn
		];
		for (const [name, um] of told.flatMap(Object.entries<number>)) {
			const found = SCREW_PITCHES.find((screw) => screw.name === ours(name));
			expect(found?.pitchUm, name).toBeCloseTo(um, 9);
		}
	});

	it('owns up to the two threads that were not read in a standard', () => {
		const guessed = SCREW_PITCHES.filter(({ source }) => source === 'memory');
		expect(guessed.map(({ name }) => name)).toEqual(['00-90', '000-120']);
	});

	it('refuses a thread without threads', () => {
		expect(() => pitchPerInch(0)).toThrow(RangeError);
		expect(() => pitchPerInch(NaN)).toThrow(RangeError);
	});
});

describe('travelLeft', () => {
	const screw = { pitchUm: 317.5, smallestStepTurns: 0.125 };

	it('counts from the carriage, in micrometres and turns (closed form)', () => {
		const { input, expected, tol } = referenceCase<
			{ turns: number[]; pitchUm: number; backlashUm: number; travelUm: number },
			{ remainingUm: number[]; remainingTurns: number[] }
		>('17_geometry.json', 'depth_with_backlash');
		const { carriageUm } = foldTurns(input.turns, input);
		const left = Array.from(carriageUm, (um) =>
			travelLeft(um, input.travelUm, { ...screw, pitchUm: input.pitchUm })
		);
		const um = left.map(({ leftUm }) => leftUm);
		const turns = left.map(({ leftTurns }) => leftTurns);
		expect(worstDifference(um, expected.remainingUm)).toBeLessThan(tol);
		expect(worstDifference(turns, expected.remainingTurns)).toBeLessThan(tol);
		expect(left.some(({ isLow }) => isLow)).toBe(false);
	});

	it('is low below one step and 100 µm (139.6875 µm for an eighth of 317.5)', () => {
		expect(travelLeft(4000 - 139.6875, 4000, screw).isLow).toBe(false);
		expect(travelLeft(4000 - 139.68, 4000, screw).isLow).toBe(true);
		expect(isTravelLow(-5, 40)).toBe(true);
		expect(() => travelLeft(0, 4000, { ...screw, pitchUm: 0 })).toThrow(RangeError);
	});
});

describe('anchoredDepths', () => {
	const anchor = { foundUm: 1950, foundSdUm: 50, foldedUm: 2013 };

	it('shifts every day by found − folded and trusts far days less (worked by hand)', () => {
		const folded = Float64Array.of(1613, 2013, 2413, NaN);
		const got = anchoredDepths(folded, anchor);
		expect(got.offsetUm).toBe(-63);
		expect([...got.depthUm]).toEqual([1550, 1950, 2350, NaN]);
		// √(50² + 40²) = 64.03 for 400 µm either way.
		expect(worstDifference(got.sdUm, [Math.sqrt(4100), 50, Math.sqrt(4100), null])).toBeLessThan(
			1e-9
		);
		expect(got.sdUm[0]).toBeCloseTo(64.03, 2);
		expect([...folded]).toEqual([1613, 2013, 2413, NaN]);
	});

	it('leaves the steps between days as the turns made them', () => {
		const folded = Float64Array.of(0, 317.5, 595.25, 555.5);
		const { depthUm } = anchoredDepths(folded, anchor);
		for (let i = 1; i < folded.length; i++) {
			expect(depthUm[i] - depthUm[i - 1]).toBeCloseTo(folded[i] - folded[i - 1], 9);
		}
	});

	it('multiplies the found depth by the shrinkage factor first', () => {
		const got = anchoredDepths(Float64Array.of(2013), { ...anchor, shrinkageFactor: 1.1 });
		expect(got.offsetUm).toBeCloseTo(132, 9);
		expect(got.depthUm[0]).toBeCloseTo(2145, 9);
	});

	it('refuses an anchor without a depth, a negative deviation and a factor that is none', () => {
		const day = Float64Array.of(0);
		expect(() => anchoredDepths(day, { ...anchor, foundUm: NaN })).toThrow(RangeError);
		expect(() => anchoredDepths(day, { ...anchor, foldedUm: NaN })).toThrow(RangeError);
		expect(() => anchoredDepths(day, { ...anchor, foundSdUm: -1 })).toThrow(RangeError);
		expect(() => anchoredDepths(day, { ...anchor, shrinkageFactor: 0 })).toThrow(RangeError);
	});
});

describe('expectedLayers', () => {
	const rangeOf = (layers: ReturnType<typeof expectedLayers>, name: string) => {
		const found = layers.find(({ layer }) => layer === name);
		return found && [found.fromUm, found.toUm];
	};

	it('counts layers below CA1 from both ends of its expected range', () => {
		const rat = expectedLayers(LAYER_LANDMARKS.rat);
		expect(rat).toHaveLength(LAYER_LANDMARKS.rat.length);
		expect(rangeOf(rat, 'ca1-pyramidal')).toEqual([1900, 2300]);
		expect(rangeOf(rat, 'dentate-hilus')).toEqual([2800, 3400]);
	});

	it('narrows them to where CA1 was found, and leaves what counts from the surface', () => {
		const rat = expectedLayers(LAYER_LANDMARKS.rat, 2050);
		expect(rangeOf(rat, 'ca1-pyramidal')).toEqual([2050, 2050]);
		expect(rangeOf(rat, 'hippocampal-fissure')).toEqual([2450, 2650]);
		expect(rangeOf(rat, 'white-matter')).toEqual([1600, 1900]);
	});

	it('leaves out what hangs on CA1 when nothing says where that lies', () => {
		const without = LAYER_LANDMARKS.rat.filter(({ layer }) => layer !== 'ca1-pyramidal');
		const got = expectedLayers(without);
		expect(got.map(({ layer }) => layer)).toEqual([
			'cortex-bottom',
			'white-matter',
			'ca3-pyramidal'
		]);
		expect(expectedLayers([])).toEqual([]);
		expect(() => expectedLayers(without, 0)).toThrow(RangeError);
	});

	it('marks every default as habit and keeps every range in order', () => {
		for (const landmark of Object.values(LAYER_LANDMARKS).flat()) {
			expect(landmark.status).toBe('common-practice');
			expect(landmark.toUm).toBeGreaterThan(landmark.fromUm);
		}
		expect(rangeOf(expectedLayers(LAYER_LANDMARKS.mouse), 'ca1-pyramidal')).toEqual([1100, 1400]);
	});
});
