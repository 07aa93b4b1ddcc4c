import { describe, expect, it, vi } from 'vitest';
import { seeded } from '../random/seeded';
import { analyseSession } from './analyse';
import { analysisResult } from './analysis-result';
import type { SessionInput } from './input';
import { ParameterError, sessionParameters, type GivenParameters } from './parameters';
import { withBundles } from './with-bundles';

// Whole sessions are analysed here; a busy machine needs its time.
vi.setConfig({ testTimeout: 30_000 });

/** A simulated animal running to and fro on 200 cm, with cells of known fields. */
function simulated({ seconds = 400, cells = 12, fromS = 0, seed = 1 } = {}): SessionInput {
	const random = seeded(seed);
	const hz = 25;
	const n = seconds * hz;
	const tS = Float64Array.from({ length: n }, (_, i) => fromS + i / hz);
	// The pace changes, or a shift by whole laps would look like no shift.
	const phase = (s: number) => (2 * Math.PI * s) / 20 + 1.5 * Math.sin(s / 37) + Math.sin(s / 23);
	const xCm = Float64Array.from({ length: n }, (_, i) => 100 - 100 * Math.cos(phase(i / hz)));
	const units = Array.from({ length: cells }, (_, u) => {
		const centre = ((u + 0.5) * 200) / cells;
		const times: number[] = [];
		for (let i = 0; i < n; i++) {
			const rate = 0.2 + 14 * Math.exp(-(((xCm[i] - centre) / 12) ** 2) / 2);
			if (random.next() < rate / hz) times.push(tS[i] + random.next() / hz);
		}
		return { unit: String(u), bundle: `T${u % 3}`, timesS: Float64Array.from(times) };
	});
	return { position: { tS, xCm, yCm: null }, units, epochs: [] };
}

const run = (input: SessionInput, more: Partial<GivenParameters> = {}) =>
	analyseSession(input, sessionParameters({ arena: 'straight:200', shuffles: 99, ...more }));

describe('analyseSession', () => {
	it('finds the fields of simulated cells and reads position from them', () => {
		const { result } = run(simulated());
		result.units.forEach((unit, u) => {
			const centre = ((u + 0.5) * 200) / 12;
			expect(Math.abs((unit.fields[0]?.centreCm[0] ?? NaN) - centre)).toBeLessThan(6);
			expect(unit.informationP).toBe(0.01);
		});
		const { decoding } = result;
		expect(decoding.medianErrorCm).toBeLessThan(10);
		expect(decoding.memory.medianErrorCm).toBeLessThan(10);
		expect(decoding.chanceMedianErrorCm).toBeGreaterThan(40);
		// A guide for unbiased decoders, not a bound here: the ends of the track hold answers in.
		expect(decoding.floorMedianErrorCm).toBeGreaterThan(1);
		expect(decoding.floorMedianErrorCm).toBeLessThan(6);
		const [low, high] = decoding.medianErrorCi95Cm ?? [NaN, NaN];
		expect(low).toBeLessThanOrEqual(decoding.medianErrorCm ?? NaN);
		expect(high).toBeGreaterThanOrEqual(decoding.medianErrorCm ?? NaN);
		expect(decoding.worthByBundle.map(({ bundle, units }) => [bundle, units])).toEqual([
			['T0', 4],
			['T1', 4],
			['T2', 4]
		]);
		expect(decoding.worthByBundle.every(({ bits, bitsCi90 }) => (bits ?? 0) > 0 && bitsCi90)).toBe(
			true
		);
		expect(decoding.unitDropCurve.map(({ units }) => units)).toEqual([1, 2, 4, 8, 12]);
		expect(decoding.unitDropCurve.at(-1)?.medianErrorCm).toBe(decoding.medianErrorCm);
		expect(result.warnings).toEqual([]);
	});

	it('gives the same for the same seed, and reports its progress up to one', () => {
		const shares: number[] = [];
		const input = simulated({ seconds: 120 });
		const parameters = sessionParameters({ arena: 'straight:200', shuffles: 50 });
		const first = analyseSession(input, parameters, (share) => shares.push(share));
		const second = analyseSession(input, parameters);
		expect(second).toEqual(first);
		expect(shares.at(-1)).toBe(1);
		expect(shares).toEqual([...shares].sort((a, b) => a - b));
	});

	it('leaves its input untouched', () => {
		const input = simulated({ seconds: 90, cells: 3 });
		const copy = structuredClone(input);
		run(input);
		expect(input).toEqual(copy);
	});

	it('does not care about the order of the units', () => {
		const input = simulated({ seconds: 200, cells: 6 });
		const forward = run(input).result;
		const back = run({ ...input, units: [...input.units].reverse() }).result;
		expect([...back.units].reverse()).toEqual(forward.units);
		expect(back.decoding.medianErrorCm).toBe(forward.decoding.medianErrorCm);
	});

	it('does not care where the clock begins', () => {
		// Whole seconds at 25 Hz and a shift by a power of two keep the arithmetic of times exact enough.
		const early = run(simulated({ seconds: 128 }), { seed: 5 }).result;
		const late = run(simulated({ seconds: 128, fromS: 4096 }), { seed: 5 }).result;
		expect(late.occupancy.secondsByBin.map((s) => (s ?? 0).toFixed(6))).toEqual(
			early.occupancy.secondsByBin.map((s) => (s ?? 0).toFixed(6))
		);
		late.units.forEach((unit, u) => {
			expect(unit.informationBitsPerSpike).toBeCloseTo(
				early.units[u].informationBitsPerSpike ?? NaN,
				6
			);
		});
	});

	it('counts every used second once and keeps posteriors that sum to one', () => {
		const { result, arrays } = run(simulated({ seconds: 150 }));
		const used = arrays.isUsed.reduce((sum, is) => sum + is * 0.04, 0);
		const seconds = result.occupancy.secondsByBin.reduce<number>((sum, s) => sum + (s ?? 0), 0);
		expect(seconds).toBeCloseTo(used, 6);
		const posterior = arrays.decoding?.posterior;
		if (!posterior) throw new Error('no posterior');
		for (let row = 0; row < posterior.window.length; row++) {
			const sum = posterior.probabilities
				.subarray(row * posterior.bins, (row + 1) * posterior.bins)
				.reduce((a, b) => a + b, 0);
			expect(sum).toBeCloseTo(1, 5);
		}
	});

	it.each([
		['ring:200', false],
		['polyline:0,0;120,0;120,80', false],
		['tree:0,0>100,0;100,0>200,0', false],
		['rectangle:200x60', true],
		['disc:200', true]
	])('runs on %s', (arena, isFlat) => {
		const { position, units } = simulated({ seconds: 150, cells: 6 });
		const yCm = isFlat ? position.xCm.map((_, i) => 30 + 20 * Math.sin(i / 61)) : null;
		const { result } = run({ position: { ...position, yCm }, units, epochs: [] }, { arena });
		expect(result.decoding.medianErrorCm).toBeLessThan(30);
		expect(result.units[2].fields[0].sizeCm === null).toBe(isFlat);
		expect(result.units[2].directions).toBeNull();
		expect(JSON.stringify(result)).not.toContain('NaN');
	});

	it('says in a sentence why figures are null', () => {
		const few = run(simulated({ seconds: 30 })).result;
		expect(few.decoding.medianErrorCm).toBeNull();
		expect(few.units[0].informationBitsPerSpike).toBeNull();
		expect(few.warnings.join(' ')).toContain('under 60 s no map');
		const input = simulated({ seconds: 150, cells: 2 });
		const sparse = input.units.map((u) => ({ ...u, bundle: null, timesS: u.timesS.slice(0, 9) }));
		const silent = run({ ...input, units: sparse }).result;
		expect(silent.decoding).toMatchObject({ unitsUsed: 0, medianErrorCm: null, worthByBundle: [] });
		expect(silent.warnings.join(' ')).toContain('No unit has 30 used spikes');
	});

	it('lets one unit alone decode and says that it is one', () => {
		const { decoding } = run(simulated({ seconds: 150, cells: 1 })).result;
		expect(decoding.unitsUsed).toBe(1);
		expect(decoding.unitDropCurve).toHaveLength(1);
	});
});

describe('input that can only give nonsense', () => {
	const good = simulated({ seconds: 90, cells: 2 });
	const moved = (change: (tS: Float64Array, xCm: Float64Array) => void): SessionInput => {
		const tS = good.position.tS.slice();
		const xCm = good.position.xCm.slice();
		change(tS, xCm);
		return { ...good, position: { tS, xCm, yCm: null } };
	};
	const times = (change: (t: number) => number): SessionInput => ({
		...good,
		units: good.units.map((u) => ({ ...u, timesS: u.timesS.map(change) }))
	});

	it.each([
		['times that go back', moved((t) => (t[100] = t[98])), 'time-order', 102],
		['one moment at two places', moved((t) => (t[100] = t[99])), 'time-order', 102],
		[
			'times in milliseconds',
			moved((t) => t.forEach((v, i) => (t[i] = v * 1e6))),
			'unit-of-time',
			null
		],
		['spikes in milliseconds', times((t) => t * 1000), 'unit-of-time', null],
		['spikes of another moment', times((t) => t + 1e6), 'no-overlap', null],
		['no spike', { ...good, units: [] }, 'no-spikes', null],
		[
			'positions far outside',
			moved((_, x) => x.forEach((v, i) => (x[i] = v + 900))),
			'outside-arena',
			2
		],
		[
			'negative positions',
			moved((_, x) => x.forEach((v, i) => (x[i] = v - 250))),
			'outside-arena',
			2
		],
		[
			'run epochs elsewhere',
			{ ...good, epochs: [{ name: 'a', kind: 'run' as const, startS: 900, stopS: 950 }] },
			'no-overlap',
			null
		],
		[
			'a moment of positions',
			{ ...good, position: { tS: Float64Array.of(0, 0.1), xCm: Float64Array.of(1, 2), yCm: null } },
			'too-short',
			null
		]
	])('is refused: %s', (_, input, code, row) => {
		expect(() => run(input)).toThrow(expect.objectContaining({ name: 'TableError', code, row }));
	});

	it('is refused: one coordinate in a box', () => {
		expect(() => run(good, { arena: 'rectangle:200x200' })).toThrow('needs x_cm and y_cm');
	});

	it('lets a sample that stands twice pass with a note, and leaves out the few outside', () => {
		const odd = moved((t, x) => {
			t[100] = t[99];
			x[100] = x[99];
			x[500] = 300;
		});
		const { warnings } = run(odd).result;
		expect(warnings[0]).toContain('1 position stands twice');
		expect(warnings[1]).toContain('1 of 2250 positions lie outside');
		expect(warnings[1]).toContain('row 502');
	});
});

describe('sessionParameters', () => {
	it('fills in session@1', () => {
		expect(sessionParameters({ arena: 'disc:70', folds: undefined })).toEqual({
			arena: 'disc:70',
			binCm: 5,
			smoothCm: 5,
			minSpeedCmS: 5,
			minOccupancyS: 0.1,
			windowMs: 250,
			folds: 10,
			prior: 'even',
			shuffles: 500,
			seed: 1,
			defaults: 'session@1'
		});
	});

	it.each([
		[{ arena: 'oval:3' }, 'arena'],
		[{ arena: 'disc:70', binCm: 0 }, 'binCm'],
		[{ arena: 'disc:70', folds: 2.5 }, 'folds'],
		[{ arena: 'disc:70', windowMs: NaN }, 'windowMs']
	])('refuses %j by name', (given, field) => {
		expect(() => sessionParameters(given)).toThrow(expect.objectContaining({ field }));
	});

	it('refuses bins that do not fit the arena', () => {
		expect(() => run(simulated({ seconds: 90 }), { arena: 'straight:50', binCm: 60 })).toThrow(
			ParameterError
		);
	});
});

describe('around a result', () => {
	it('adds digests, version and clock', () => {
		const { result } = run(simulated({ seconds: 90, cells: 1 }));
		const full = analysisResult(result, {
			positionSha256: 'aa',
			spikesSha256: 'bb',
			codeVersion: '1',
			startedAt: '2026-01-01T00:00:00.000Z',
			elapsedS: 2
		});
		expect(full.inputs.position).toMatchObject({ sha256: 'aa', samples: 2250 });
		expect(full.inputs.spikes).toMatchObject({ sha256: 'bb', units: 1 });
		expect(full).toMatchObject({ codeVersion: '1', elapsedS: 2 });
	});

	it('takes bundles from the table of units only where the spikes name none', () => {
		const unit = (label: string, bundle: string | null) => ({
			unit: label,
			bundle,
			timesS: new Float64Array(0)
		});
		const row = (label: string, bundle: string) => ({
			unit: label,
			bundle,
			class: null,
			amplitudeUv: null,
			noiseUv: null
		});
		const got = withBundles(
			[unit('1', null), unit('2', 'A'), unit('3', null), unit('4', null)],
			[row('1', 'B'), row('2', 'C'), row('3', 'B'), row('3', 'C')]
		);
		expect(got.map(({ bundle }) => bundle)).toEqual(['B', 'A', null, null]);
	});
});
