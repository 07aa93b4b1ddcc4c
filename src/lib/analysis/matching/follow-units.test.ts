import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { followUnits, type Followed } from './follow-units';
import { lineageProbability } from './lineage-probability';
import { MATCH_RULE } from './match-rule';
import type { BundleDay, MatchUnit } from './match-unit';
import { turnoverByDay } from './turnover';

/** Cells of unlike shape, each cut with a little noise. */
function unitOf(cell: number, day: number, depthUm = NaN): MatchUnit {
	const shape = seeded(1000 * (cell + 1));
	const noise = seeded(77 * (day + 1) + 1313 * cell);
	const uv = Float64Array.from({ length: 32 }, () => 100 * (shape.next() - 0.5));
	return {
		waveform: { uv: uv.map((value) => value + 4 * (noise.next() - 0.5)), channels: 4 },
		correlogram: new Float64Array(0),
		rateHz: 1,
		depthUm
	};
}
const daysOf = (cells: readonly (readonly number[])[], depthsUm?: readonly number[]): BundleDay[] =>
	cells.map((seen, day) => ({
		day,
		bundleDepthUm: depthsUm?.[day] ?? 2000,
		units: seen.map((cell) => unitOf(cell, day))
	}));

/** Lineages as lists of "day:cell". */
const told = ({ lineages }: Followed, cells: readonly (readonly number[])[]) =>
	lineages
		.map(({ members }) => members.map(({ day, unit }) => `${day}:${cells[day][unit]}`).join(' '))
		.sort();

describe('followUnits', () => {
	const cells = [
		[0, 1, 2],
		[2, 0],
		[3, 1, 0],
		[0, 3]
	];

	it('follows cells, also one that was missed on a day, and begins lineages for new ones', () => {
		const followed = followUnits(daysOf(cells), MATCH_RULE);
		expect(told(followed, cells)).toEqual(['0:0 1:0 2:0 3:0', '0:1 2:1', '0:2 1:2', '2:3 3:3']);
		expect(followed.lineageOf.map((row) => [...row])).toEqual([
			[0, 1, 2],
			[2, 0],
			[3, 1, 0],
			[0, 3]
		]);
	});

	it('keeps every pair that was weighed, with what speaks for and against it', () => {
		const { candidates } = followUnits(daysOf(cells.slice(0, 2)), MATCH_RULE);
		expect(candidates).toHaveLength(6);
		const right = candidates.filter(({ probability }) => probability > 0.9);
		expect(right.map(({ from, to }) => [cells[0][from.unit], cells[1][to.unit]])).toEqual([
			[0, 0],
			[2, 2]
		]);
		expect(candidates[0].prior).toBeCloseTo(0.36, 12);
		expect(candidates.every(({ features }) => Number.isNaN(features.correlogramZ))).toBe(true);
	});

	it('looks three recorded days back and no further', () => {
		const gap = [[0], [1], [2], [0]];
		const longer = [[0], [1], [2], [3], [0]];
		expect(told(followUnits(daysOf(gap), MATCH_RULE), gap)).toContain('0:0 3:0');
		expect(told(followUnits(daysOf(longer), MATCH_RULE), longer)).toContain('0:0');
		const far = { ...MATCH_RULE, reachDays: 4 };
		expect(told(followUnits(daysOf(longer), far), longer)).toContain('0:0 4:0');
	});

	it('does not depend on the order of the units of a day', () => {
		const mixed = cells.map((seen) => [...seen].reverse());
		const plain = told(followUnits(daysOf(cells), MATCH_RULE), cells);
		expect(told(followUnits(daysOf(mixed), MATCH_RULE), mixed)).toEqual(plain);
	});

	it('has no candidates beyond 150 µm, by the depth of the bundle or of the units', () => {
		const two = [[0], [0]];
		expect(followUnits(daysOf(two, [2000, 2150]), MATCH_RULE).lineages).toHaveLength(1);
		const moved = followUnits(daysOf(two, [2000, 2151]), MATCH_RULE);
		expect(moved.lineages).toHaveLength(2);
		expect(moved.candidates).toEqual([]);
		const known = daysOf(two, [2000, 2151]).map((day, k) => ({
			...day,
			units: [unitOf(0, k, 2100 + k)]
		}));
		expect(followUnits(known, MATCH_RULE).lineages).toHaveLength(1);
	});

	it('joins what a person called the same, and parts what a person called different', () => {
		const two = [
			[0, 1],
			[1, 0]
		];
		const at = (day: number, unit: number) => ({ day, unit });
		const same = [{ from: at(0, 0), to: at(1, 0), isSame: true }];
		const joined = followUnits(daysOf(two), MATCH_RULE, same);
		expect(told(joined, two)).toEqual(['0:0 1:1', '0:1', '1:0']);
		expect(joined.lineages[0].probabilities).toEqual([1]);
		const different = [{ from: at(0, 0), to: at(1, 1), isSame: false }];
		expect(told(followUnits(daysOf(two), MATCH_RULE, different), two)).toEqual([
			'0:0',
			'0:1 1:1',
			'1:0'
		]);
	});

	it('keeps apart what a person called different also by way of a third day', () => {
		const three = [[0], [0], [0]];
		const parted = [{ from: { day: 0, unit: 0 }, to: { day: 2, unit: 0 }, isSame: false }];
		const followed = followUnits(daysOf(three), MATCH_RULE, parted);
		expect(told(followed, three)).toEqual(['0:0 1:0', '2:0']);
	});

	it('copes with days without units, and refuses days out of order and rules without sense', () => {
		expect(followUnits([], MATCH_RULE).lineages).toEqual([]);
		expect(told(followUnits(daysOf([[0], [], [0]]), MATCH_RULE), [[0], [], [0]])).toEqual([
			'0:0 2:0'
		]);
		const days = daysOf([[0], [0]]);
		expect(() => followUnits([days[1], days[0]], MATCH_RULE)).toThrow(RangeError);
		const wrong = [
			{ survivalPerDay: 1 },
			{ missedPerDay: -1 },
			{ reachDays: 0 },
			{ threshold: NaN },
			{ leastProbability: 0.9 }
		];
		for (const part of wrong) {
			expect(() => followUnits(days, { ...MATCH_RULE, ...part })).toThrow(RangeError);
		}
	});
});

describe('lineageProbability', () => {
	it('multiplies the steps between two days, either way round', () => {
		const lineage = {
			members: [0, 1, 3, 4].map((day) => ({ day, unit: 0 })),
			probabilities: [0.9, 0.8, 0.5]
		};
		expect(lineageProbability(lineage, 0, 3)).toBeCloseTo(0.72, 12);
		expect(lineageProbability(lineage, 4, 1)).toBeCloseTo(0.4, 12);
		expect(lineageProbability(lineage, 3, 3)).toBe(1);
		expect(lineageProbability(lineage, 0, 2)).toBeNaN();
	});
});

describe('turnoverByDay', () => {
	it('tells kept, found again, new, missed and lost (by hand)', () => {
		const cells = [[0, 1, 2], [0, 2], [3, 1, 0], [0, 3], [0]];
		const got = turnoverByDay(followUnits(daysOf(cells), MATCH_RULE), MATCH_RULE.reachDays);
		expect(got).toEqual([
			{ kept: 0, foundAgain: 0, fresh: 3, missed: 0, lost: 0, isProvisional: false },
			{ kept: 2, foundAgain: 0, fresh: 0, missed: 1, lost: 0, isProvisional: false },
			{ kept: 1, foundAgain: 1, fresh: 1, missed: 0, lost: 1, isProvisional: false },
			{ kept: 2, foundAgain: 0, fresh: 0, missed: 0, lost: 1, isProvisional: true },
			{ kept: 1, foundAgain: 0, fresh: 0, missed: 0, lost: 1, isProvisional: true }
		]);
	});
});
