import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { foldTurns } from './fold-turns';

const settings = { pitchUm: 317.5, backlashUm: 40 };

describe('foldTurns', () => {
	it('takes up the slack before the carriage follows a reversal', () => {
		const { screwUm, carriageUm } = foldTurns([2, -0.25, 0.25], settings);
		expect([...screwUm]).toEqual([635, 555.625, 635]);
		expect([...carriageUm]).toEqual([635, 595.625, 635]);
	});

	it('agrees with an independent implementation', () => {
		const cases: {
			id: string;
			input: { turns: number[]; pitchUm: number; backlashUm: number };
			expected: { nominalUm: number[]; carriageUm: number[] };
		}[] = JSON.parse(readFileSync('tests/fixtures/reference/17_geometry.json', 'utf8')).cases;
		const known = cases.find(({ id }) => id === 'depth_with_backlash');
		if (!known) throw new Error('the reference case is missing');
		const { screwUm, carriageUm } = foldTurns(known.input.turns, known.input);
		known.expected.nominalUm.forEach((um, i) => expect(screwUm[i]).toBeCloseTo(um, 8));
		known.expected.carriageUm.forEach((um, i) => expect(carriageUm[i]).toBeCloseTo(um, 8));
	});

	it('keeps the carriage within the slack of the screw, whatever is turned', () => {
		const random = seeded(5);
		const turns = Array.from({ length: 500 }, () => (random.below(33) - 16) / 16);
		const { screwUm, carriageUm } = foldTurns(turns, settings);
		for (let i = 0; i < turns.length; i++) {
			expect(carriageUm[i]).toBeGreaterThanOrEqual(screwUm[i]);
			expect(carriageUm[i]).toBeLessThanOrEqual(screwUm[i] + 40);
		}
	});

	it('is the plain sum without slack, from where the screw stood at surgery', () => {
		const { carriageUm } = foldTurns([1, -0.5], { pitchUm: 250, backlashUm: 0, startUm: 100 });
		expect([...carriageUm]).toEqual([350, 225]);
	});

	it('does not move a carriage whose reversal is smaller than the slack', () => {
		expect(foldTurns([1, -0.125], settings).carriageUm[1]).toBe(317.5);
	});

	it('gives nothing for no turns, and leaves its input alone', () => {
		expect(foldTurns([], settings).screwUm).toHaveLength(0);
		const turns = Object.freeze([1, -1]);
		foldTurns(turns, settings);
		expect(turns).toEqual([1, -1]);
	});

	it('refuses a pitch or slack that no screw has', () => {
		expect(() => foldTurns([1], { pitchUm: 0, backlashUm: 0 })).toThrow(RangeError);
		expect(() => foldTurns([1], { pitchUm: 300, backlashUm: -1 })).toThrow(RangeError);
		expect(() => foldTurns([1], { pitchUm: NaN, backlashUm: 0 })).toThrow(RangeError);
	});
});

describe('a ledger of turns', () => {
	const random = seeded(31);
	/** Sixteenths, so that sums are exact. */
	const ledger = () => Array.from({ length: 40 }, () => (random.below(33) - 16) / 16);
	const lastOf = (turns: number[]) => {
		const { screwUm, carriageUm } = foldTurns(turns, settings);
		return [screwUm.at(-1), carriageUm.at(-1)];
	};

	it('ends alike when any turn is done as two in the same direction', () => {
		for (let round = 0; round < 30; round++) {
			const turns = ledger();
			const at = random.below(turns.length);
			const part = turns[at] * (random.below(5) / 4);
			const split = [...turns.slice(0, at), part, turns[at] - part, ...turns.slice(at + 1)];
			expect(lastOf(split)).toEqual(lastOf(turns));
		}
	});

	it('folds a ledger in two parts as in one, going on from where the first part left off', () => {
		for (let round = 0; round < 30; round++) {
			const turns = ledger();
			const whole = foldTurns(turns, settings);
			// From a downward turn with the slack taken up the rest is a ledger of its own.
			const cut = turns.findIndex(
				(t, i) => i > 10 && t > 0 && whole.screwUm[i] === whole.carriageUm[i]
			);
			expect(cut).toBeGreaterThan(10);
			const rest = foldTurns(turns.slice(cut + 1), { ...settings, startUm: whole.screwUm[cut] });
			const tail = [...whole.carriageUm.slice(cut + 1)];
			expect(worstDifference(rest.carriageUm, tail)).toBeLessThan(1e-9);
		}
	});

	it('never moves the carriage against the turn', () => {
		const turns = ledger();
		const { carriageUm } = foldTurns(turns, settings);
		for (let i = 1; i < turns.length; i++) {
			expect((carriageUm[i] - carriageUm[i - 1]) * turns[i]).toBeGreaterThanOrEqual(0);
		}
	});
});
