import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { seeded, type Random } from '../random/seeded';
import { quantile } from '../statistics/quantile';
import { AMPLITUDE } from './amplitude-evidence';
import { fallScore, type EvidenceKind } from './fall-score';
import { fallThresholds } from './fall-threshold';
import { simulatedBundle, simulateDay } from './simulated-bundle';
import type { YieldModel } from './yield-model';

interface Scenario {
	readonly s0: number;
	readonly a0: number;
	readonly s1: number;
	readonly a1: number;
	readonly stationaryMean0: number;
}

interface ByTarget {
	readonly targetArl0: number;
	readonly h: number;
	readonly medianDelayDays: number;
	readonly p90DelayDays: number;
}

interface Outcome {
	readonly textbookThreshold: Record<string, number>;
	readonly detectors: Record<string, { byTarget: ByTarget[] }>;
}

const DETECTORS: Record<EvidenceKind, string> = {
	totals: 'inarLlrCusum',
	'kept-new': 'keptAndNewLlrCusum',
	'kept-new-amplitude': 'keptNewAmplitudeLlrCusum'
};
const KINDS = Object.keys(DETECTORS) as EvidenceKind[];

// The outside figures are Monte Carlo too (numpy, 4000 runs); so are these, with fewer runs.
describe.each([
	'six_units_to_one',
	'six_units_to_three',
	'twelve_units_to_four',
	'four_units_to_one'
])('%s (simulated with numpy)', (id) => {
	const { input, expected } = referenceCase<Scenario, Outcome>('19_simulated_yield.json', id);
	const usual = { survival: input.s0, arrivals: input.a0 };
	const fallen = { survival: input.s1, arrivals: input.a1 };

	it('has the limits of a false alarm in 60 and in 200 days within Monte Carlo error', () => {
		for (const kind of KINDS) {
			const rows = expected.detectors[DETECTORS[kind]].byTarget;
			const got = fallThresholds(usual, [fallen], kind, [60, 200], seeded(3), { runs: 150 });
			// 0.1 of ours, 0.05 of theirs, and a bisection of theirs that stopped near the target.
			expect(Math.abs(got[0] - rows[0].h)).toBeLessThan(0.35);
			expect(Math.abs(got[1] - rows[1].h)).toBeLessThan(0.35);
		}
	});

	it('finds the change after as many days, and sooner with amplitudes than without', () => {
		const found = KINDS.map((kind) => {
			const row = expected.detectors[DETECTORS[kind]].byTarget[2];
			const delays = delaysOf(usual, fallen, kind, row.h, seeded(8));
			const slack = Math.max(1, 0.15 * row.medianDelayDays);
			expect(Math.abs(quantile(delays, 0.5) - row.medianDelayDays)).toBeLessThanOrEqual(slack);
			const wide = Math.max(2, 0.25 * row.p90DelayDays);
			expect(Math.abs(quantile(delays, 0.9) - row.p90DelayDays)).toBeLessThanOrEqual(wide);
			return quantile(delays, 0.5);
		});
		expect(found[2]).toBeLessThan(found[0]);
	});

	it('alarms far too often with the limit that holds for independent counts', () => {
		const on = 'ewma_L2.86_arl0_on_this_model';
		const runLength = textbookRunLength(usual, input.stationaryMean0, seeded(4));
		expect(runLength / expected.textbookThreshold[on]).toBeGreaterThan(0.85);
		expect(runLength / expected.textbookThreshold[on]).toBeLessThan(1.15);
	});
});

describe('fallThresholds', () => {
	const usual = { survival: 0.8, arrivals: 1.2 };
	const fallen = { survival: 0.6, arrivals: 0.48 };

	it('repeats itself for a seed and rises with the run length', () => {
		const first = fallThresholds(usual, [fallen], 'kept-new', [20, 60], seeded(1), { runs: 40 });
		const again = fallThresholds(usual, [fallen], 'kept-new', [20, 60], seeded(1), { runs: 40 });
		expect(first).toEqual(again);
		expect(first[0]).toBeLessThan(first[1]);
	});

	it('rises when a second fall is looked for', () => {
		const half = { survival: 0.7, arrivals: 0.84 };
		const options = { runs: 100 };
		const [one] = fallThresholds(usual, [fallen], 'kept-new', [60], seeded(1), options);
		const [two] = fallThresholds(usual, [fallen, half], 'kept-new', [60], seeded(1), options);
		expect(two).toBeGreaterThan(one);
	});

	it('refuses run lengths below a day', () => {
		expect(() => fallThresholds(usual, [fallen], 'totals', [], seeded(1))).toThrow(RangeError);
		expect(() => fallThresholds(usual, [fallen], 'totals', [0.5], seeded(1))).toThrow(RangeError);
	});
});

/** Days from a change on day 20 to the alarm, of bundles that had not alarmed before. */
function delaysOf(
	usual: YieldModel,
	fallen: YieldModel,
	kind: EvidenceKind,
	limit: number,
	random: Random
): number[] {
	const score = fallScore(usual, [fallen], kind);
	const delays: number[] = [];
	for (let run = 0; run < 800; run++) {
		const bundle = simulatedBundle(usual, random);
		const sums = new Float64Array(1);
		for (let day = 1; day < 400; day++) {
			const isFallen = day >= 20;
			simulateDay(bundle, isFallen ? fallen : usual, isFallen ? AMPLITUDE.delta : 0, random);
			if (score(bundle, sums) < limit) continue;
			if (isFallen) delays.push(day - 19);
			break;
		}
	}
	return delays;
}

/** Mean run length of the EWMA of square-rooted counts with λ 0.2 and L 2.86, lower limit. */
function textbookRunLength(model: YieldModel, mean: number, random: Random): number {
	const { centre, sd } = squareRootMoments(mean);
	const limit = -2.86 * Math.sqrt(0.2 / 1.8);
	let total = 0;
	const runs = 800;
	for (let run = 0; run < runs; run++) {
		const bundle = simulatedBundle(model, random);
		for (let z = 0, day = 1; ; day++) {
			simulateDay(bundle, model, 0, random);
			z = (0.2 * (Math.sqrt(bundle.units + 0.375) - centre)) / sd + 0.8 * z;
			if (z > limit) continue;
			total += day;
			break;
		}
	}
	return total / runs;
}

function squareRootMoments(mean: number): { centre: number; sd: number } {
	let p = Math.exp(-mean);
	let centre = 0;
	let square = 0;
	for (let n = 0; n < 200; n++) {
		centre += p * Math.sqrt(n + 0.375);
		square += p * (n + 0.375);
		p *= mean / (n + 1);
	}
	return { centre, sd: Math.sqrt(square - centre * centre) };
}
