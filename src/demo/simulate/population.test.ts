import { describe, expect, it } from 'vitest';
import { cellsOfDay, type Place, type Story } from './population';

const track: Place = { name: 'track', widthCm: 300, heightCm: null };
const box: Place = { name: 'box', widthCm: 100, heightCm: 80 };

const story: Story = {
	seed: 4,
	bundles: ['T01', 'T02'],
	cellsPerBundle: [8, 8],
	days: 6,
	turnover: 0,
	fieldDriftCm: 0,
	silentFrom: {}
};
const names = (of: Story, day: number) => cellsOfDay(of, day, track).map(({ name }) => name);

describe('a population of simulated cells', () => {
	it('stays as it is without turnover and drift', () => {
		expect(cellsOfDay(story, 5, track)).toEqual(cellsOfDay(story, 0, track));
	});

	it('has other fields in another arena, for the same cells', () => {
		const here = cellsOfDay(story, 0, track);
		const there = cellsOfDay(story, 0, box);
		expect(there.map(({ name }) => name)).toEqual(here.map(({ name }) => name));
		expect(there.map(({ kind }) => kind)).toEqual(here.map(({ kind }) => kind));
		expect(there[0].fields[0].yCm).not.toBeNull();
		expect(here[0].fields[0].yCm).toBeNull();
	});

	it('drifts from day to day, and further over more days', () => {
		const drifting = { ...story, fieldDriftCm: 5 };
		const moved = (day: number) => {
			const [from, to] = [cellsOfDay(drifting, 0, track), cellsOfDay(drifting, day, track)];
			const squares = to.map((cell, k) => (cell.fields[0].xCm - from[k].fields[0].xCm) ** 2);
			return Math.sqrt(squares.reduce((sum, square) => sum + square, 0) / squares.length);
		};
		expect(moved(1)).toBeGreaterThan(2);
		expect(moved(5)).toBeGreaterThan(moved(1));
	});

	it('loses cells and gains others, the number staying', () => {
		const changing = { ...story, turnover: 0.3 };
		const [first, last] = [names(changing, 0), names(changing, 5)];
		expect(last).toHaveLength(16);
		const kept = last.filter((name) => first.includes(name)).length;
		expect(kept).toBeGreaterThan(0);
		expect(kept).toBeLessThan(12);
	});

	it('falls silent on a dying bundle, its spikes shrinking first', () => {
		const dying = { ...story, silentFrom: { T02: 3 } };
		const amplitude = (day: number) =>
			cellsOfDay(dying, day, track).find(({ bundle }) => bundle === 'T02')?.amplitudeUv ?? 0;
		expect(amplitude(1)).toBeLessThan(amplitude(0));
		expect(amplitude(2)).toBeLessThan(amplitude(1));
		expect(names(dying, 3).every((name) => name.startsWith('T01'))).toBe(true);
		expect(names(dying, 3)).toHaveLength(8);
	});
});
