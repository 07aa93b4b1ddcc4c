import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
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
