import { beforeAll, describe, expect, it, vi } from 'vitest';
import { recording, recordingReference } from '../../../../tests/factories/recording';
import { analyseSession } from './analyse';
import type { SessionInput } from './input';
import { sessionParameters, type GivenParameters } from './parameters';

// A whole recording is analysed in each test; a busy machine needs its time.
vi.setConfig({ testTimeout: 60_000 });

// Figures of two open recordings made from written definitions by a separate program in Python
// (numpy), and again by a third in another language. They are rounded to four decimals, hence 5e-5.
const BITS = 5e-5;
const CM = 0.001;

const CASES = [
	{
		name: 'ca1-linear-track',
		file: 'linear.csv',
		reference: 'reference.json',
		given: { arena: 'straight:117' }
	},
	{
		name: 'ca1-linear-track',
		file: 'linear.csv',
		reference: 'reference-fine.json',
		given: { arena: 'straight:117', binCm: 3, smoothCm: 3 }
	},
	{
		name: 'ca1-w-maze',
		file: 'position.csv',
		reference: 'reference.json',
		given: { arena: 'rectangle:104x90' }
	}
] as const;

const difference = (got: number | null, want: number | null) =>
	got === null || want === null ? (got === want ? 0 : Infinity) : Math.abs(got - want);

describe.each(CASES)('$name with $reference', ({ name, file, reference, given }) => {
	const want = recordingReference(name, reference);
	let input: SessionInput;
	beforeAll(async () => {
		input = await recording(name, file);
	});
	const run = (more: Partial<GivenParameters> = {}) =>
		analyseSession(input, sessionParameters({ ...given, shuffles: 0, ...more }));

	it('has the same dwell and the same maps', () => {
		const { result } = run();
		const seconds = result.occupancy.secondsByBin.map((s) => s ?? 0);
		expect(seconds.reduce((a, b) => a + b, 0)).toBeCloseTo(want.used_dwell_s, 3);
		expect(seconds.filter((s) => s >= 0.1)).toHaveLength(want.valid_bins);
		expect(result.units).toHaveLength(Object.keys(want.units).length);
		for (const unit of result.units) {
			const told = want.units[unit.unit];
			expect([unit.spikes, unit.spikesUsed]).toEqual([told.n_spikes, told.used_spikes]);
			expect(difference(unit.meanRateHz, told.used_mean_rate_hz)).toBeLessThan(BITS);
			expect(difference(unit.informationBitsPerSpike, told.si_smooth)).toBeLessThan(BITS);
			expect(difference(unit.sparsity, told.sparsity_smooth)).toBeLessThan(BITS);
			expect(difference(unit.peakRateHz, told.peak_smooth_hz)).toBeLessThan(BITS);
			expect(difference(unit.splitHalfR, told.half_corr)).toBeLessThan(BITS);
			if (told.used_spikes > 0) {
				expect(unit.peakCm?.filter((cm) => cm !== null)).toEqual(told.peak_at_cm);
			}
		}
	});

	it.each(want.decoding)('decodes alike in windows of $tau_s s', (told) => {
		const windowMs = told.tau_s * 1000;
		const even = run({ windowMs }).result.decoding;
		expect([even.windows, even.unitsUsed]).toEqual([told.windows, told.units]);
		expect(difference(even.medianErrorCm, told.median_error_cm)).toBeLessThan(CM);
		expect(difference(even.meanErrorCm, told.mean_error_cm)).toBeLessThan(CM);
		expect(difference(even.chanceMedianErrorCm, told.chance_median_error_cm)).toBeLessThan(CM);
		const spent = run({ windowMs, prior: 'time-spent' }).result.decoding;
		expect(difference(spent.medianErrorCm, told.median_error_cm_dwell_prior)).toBeLessThan(CM);
	});
});

describe('ca1-linear-track from x and y', () => {
	it('linearises along the principal axis and comes within the rounding of the file', async () => {
		const session = await recording('ca1-linear-track', 'position.csv');
		const given = await recording('ca1-linear-track', 'linear.csv');
		const parameters = sessionParameters({ arena: 'straight:117', shuffles: 0 });
		const { result, arrays } = analyseSession(session, parameters);
		// Coordinates are rounded to 0.01 cm; the source projected before rounding.
		let worst = 0;
		arrays.xCm.forEach((x, i) => (worst = Math.max(worst, Math.abs(x - given.position.xCm[i]))));
		expect(worst).toBeLessThan(0.02);
		const want = recordingReference('ca1-linear-track');
		expect(
			difference(result.decoding.medianErrorCm, want.decoding[0].median_error_cm)
		).toBeLessThan(0.05);
		const clear = result.units.find(({ unit }) => unit === '14');
		expect(
			difference(clear?.informationBitsPerSpike ?? null, want.units['14'].si_smooth)
		).toBeLessThan(0.01);
	});

	it('is honest about cells that fire both ways, one way, or hardly at all', async () => {
		const session = await recording('ca1-linear-track', 'linear.csv');
		const { result } = analyseSession(
			session,
			sessionParameters({ arena: 'straight:117', shuffles: 99 })
		);
		const unit = (label: string) => {
			const found = result.units.find((one) => one.unit === label);
			if (!found) throw new Error(`no unit ${label}`);
			return found;
		};
		// Unit 14 is a clear place cell that fires on the way up.
		expect(unit('14').informationP).toBe(0.01);
		expect(unit('14').directions?.up.spikesUsed).toBeGreaterThan(500);
		expect(unit('14').directions?.down.spikesUsed).toBeLessThan(60);
		expect(unit('14').oddEvenR).toBeGreaterThan(0.9);
		// Unit 4 is silent while running: nulls, and a sentence that names it.
		expect(unit('4')).toMatchObject({
			peakCm: null,
			informationBitsPerSpike: null,
			informationP: null,
			splitHalfR: null,
			fields: []
		});
		expect(
			result.warnings.some((w) => w.startsWith('Without a spike') && w.includes('4, 7, 27'))
		).toBe(true);
	});
});
