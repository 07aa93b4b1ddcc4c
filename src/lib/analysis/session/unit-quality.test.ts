import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import type { UnitEvidence, UnitInput } from './input';
import { unitQuality } from './unit-quality';

const train = (unit: string, ...timesS: number[]): UnitInput => ({
	unit,
	bundle: 'T01',
	timesS: Float64Array.from(timesS)
});
const regular = (unit: string, count: number, everyS: number): UnitInput =>
	train(unit, ...Array.from({ length: count }, (_, k) => k * everyS));

const evidence = (more: Partial<UnitEvidence>): UnitEvidence => ({
	rows: [],
	waveforms: [],
	waveformHz: null,
	features: [],
	...more
});

describe('quality of the units of a session', () => {
	it('counts violations and contamination from spikes alone (Hill, Mehta and Kleinfeld 2011)', () => {
		// 6000 spikes in 1800 s with 12 pairs under 2 ms: q = 0.3, C = ½(1 − √(1 − 2q)).
		const timesS = Array.from({ length: 5988 }, (_, k) => 0.3 * k);
		const pairs = timesS.slice(0, 12).map((timeS) => timeS + 0.001);
		const unit = train('1', ...[...timesS, ...pairs].sort((a, b) => a - b));
		const [{ refractoryViolations, contamination, contaminationLimit95 }] = unitQuality(
			[unit],
			0,
			1800
		);
		expect(refractoryViolations).toBe(12);
		expect(contamination).toBeCloseTo(0.183772233983, 9);
		expect(contaminationLimit95).toBeNull();
	});

	it('says null where nothing was handed in, and does not call such a unit good', () => {
		const [quality] = unitQuality([regular('1', 900, 2)], 0, 1800);
		expect(quality).toMatchObject({
			level: 'not-known',
			signalToNoise: null,
			isolationDistance: null,
			troughToPeakMs: null,
			type: null,
			featuresUsed: 0
		});
	});

	it('reads size, width and type from waveforms, noise from the units table', () => {
		const uv = Float64Array.of(0, -80, -20, 40, 0, /* second wire */ 0, -8, -2, 4, 0);
		const rows = [
			{ unit: '1', bundle: 'T01', class: null, amplitudeUv: null, noiseUv: 12 },
			{ unit: '2', bundle: 'T01', class: 'interneuron' as const, amplitudeUv: null, noiseUv: null }
		];
		const waveforms = [{ unit: '1', bundle: null, channelLabels: ['1', '2'], channels: 2, uv }];
		const [first, second] = unitQuality(
			[regular('1', 900, 2), regular('2', 900, 2)],
			0,
			1800,
			evidence({ rows, waveforms, waveformHz: 4000 })
		);
		expect(first).toMatchObject({
			peakToPeakUv: 120,
			signalToNoise: 5,
			troughToPeakMs: 0.5,
			type: 'principal'
		});
		// A person's class stands, and no waveform means no figure.
		expect(second).toMatchObject({ type: 'interneuron', peakToPeakUv: null });
	});

	it('takes isolation from the features of the unit’s own bundle and tells dead wires', () => {
		const random = seeded(3, 'cloud');
		const inside = Array.from({ length: 40 }, () => [random.next(), random.next(), 0]);
		const outside = Array.from({ length: 60 }, () => [5 + random.next(), random.next(), 0]);
		const features = [
			{
				bundle: 'T01',
				units: ['1'],
				unitOf: Int32Array.from([...inside.map(() => 0), ...outside.map(() => -1)]),
				values: Float64Array.from([...inside, ...outside].flat()),
				dimensions: 3
			},
			{
				bundle: 'T02',
				units: ['1'],
				unitOf: Int32Array.of(0),
				values: Float64Array.of(1, 2, 3),
				dimensions: 3
			}
		];
		const [quality] = unitQuality([regular('1', 900, 2)], 0, 1800, evidence({ features }));
		expect(quality).toMatchObject({ featuresUsed: 2, deadFeatures: [3] });
		expect(quality.isolationDistance).toBeGreaterThan(100);
		expect(quality.lRatio).toBeLessThan(1e-6);
	});

	it('takes nothing from a table that names the label in two bundles while the spikes name none', () => {
		const rows = ['T01', 'T02'].map((bundle) => ({
			unit: '1',
			bundle,
			class: 'principal' as const,
			amplitudeUv: null,
			noiseUv: null
		}));
		const loose = { ...regular('1', 900, 2), bundle: null };
		expect(unitQuality([loose], 0, 1800, evidence({ rows }))[0].type).toBeNull();
	});
});
