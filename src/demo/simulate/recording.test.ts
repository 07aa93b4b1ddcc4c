import { describe, expect, it } from 'vitest';
import { seeded } from '$lib/analysis/random/seeded';
import { analyseSession } from '$lib/analysis/session/analyse';
import { sessionParameters } from '$lib/analysis/session/parameters';
import { readPosition, readSpikes, readUnits } from '$lib/analysis/tables/read-session-tables';
import type { TrueCell } from './cell';
import { cellsOfDay, type Place, type Story } from './population';
import { recordRun } from './recording';
import { runOpen } from './run-open';
import { runStraight } from './run-straight';
import { REFRACTORY_S } from './spike-train';

const bytes = (text: string) => [new TextEncoder().encode(text)];

const story: Story = {
	seed: 4,
	bundles: ['T01', 'T02', 'T03', 'T04', 'T05', 'T06'],
	cellsPerBundle: [5, 5, 5, 5, 5, 5],
	days: 3,
	turnover: 0.1,
	fieldDriftCm: 1,
	silentFrom: { T02: 2 }
};
const track: Place = { name: 'track', widthCm: 300, heightCm: null };
const box: Place = { name: 'box', widthCm: 100, heightCm: 80 };
const origin = { xCm: 20, yCm: 60 };

const onTrack = (seed: number, cells: readonly TrueCell[]) =>
	recordRun(runStraight(300, 600, seeded(seed, 'run')), cells, seed, origin);

async function read({ positionCsv, spikesCsv }: { positionCsv: string; spikesCsv: string }) {
	return {
		position: await readPosition(bytes(positionCsv)),
		spikes: await readSpikes(bytes(spikesCsv))
	};
}

describe('a simulated session', () => {
	it('is the same bytes for the same seed, and other bytes for another', () => {
		const cells = cellsOfDay(story, 0, track);
		expect(onTrack(7, cells)).toEqual(onTrack(7, cells));
		expect(onTrack(8, cells).spikesCsv).not.toBe(onTrack(7, cells).spikesCsv);
	});

	it('keeps a cell as it is when another is taken away', () => {
		const cells = cellsOfDay(story, 0, track);
		const last = (csv: string) => csv.split('\n').filter((row) => row.endsWith(',T06')).length;
		expect(last(onTrack(7, cells.slice(5)).spikesCsv)).toBe(last(onTrack(7, cells).spikesCsv));
	});

	it('has no two spikes of a cell within its dead time', async () => {
		const { spikes } = await read(onTrack(7, cellsOfDay(story, 0, track)));
		for (const { timesS } of spikes.units) {
			for (let i = 1; i < timesS.length; i++) {
				expect(timesS[i] - timesS[i - 1]).toBeGreaterThan(REFRACTORY_S - 2e-5);
			}
		}
	});

	it('names every unit with its bundle and kind', async () => {
		const cells = cellsOfDay(story, 0, track);
		const units = await readUnits(bytes(onTrack(7, cells).unitsCsv));
		expect(units.map(({ bundle }) => bundle)).toEqual(cells.map(({ bundle }) => bundle));
	});
});

describe('the analysis of a simulated run', () => {
	it('finds place on a track, and the fields where they truly are', async () => {
		const cells = cellsOfDay(story, 0, track);
		const { position, spikes } = await read(onTrack(7, cells));
		const { result } = analyseSession(
			{
				position,
				units: spikes.units,
				ends: { a: { xCm: 20, yCm: 60 }, b: { xCm: 320, yCm: 60 } },
				epochs: []
			},
			sessionParameters({ arena: 'straight:300', shuffles: 50 })
		);
		expect(result.decoding.medianErrorCm).toBeLessThan(12);
		expect(result.decoding.chanceMedianErrorCm).toBeGreaterThan(50);
		const single = cells.flatMap((cell, k) =>
			cell.kind === 'principal' && cell.fields.length === 1 && inside(cell.fields[0].xCm)
				? [
						{
							truth: cell.fields[0].xCm,
							unit: result.units.find(({ unit }) => unit === String(k + 1))
						}
					]
				: []
		);
		expect(single.length).toBeGreaterThan(8);
		const misses = single.map(({ truth, unit }) => Math.abs((unit?.peakCm?.[0] ?? NaN) - truth));
		expect(Math.max(...misses)).toBeLessThan(15);
		expect(misses.filter((cm) => cm <= 7.5).length / misses.length).toBeGreaterThan(0.8);
	});

	it('finds place in an open field', async () => {
		const path = runOpen(100, 80, 600, seeded(9, 'run'));
		const recording = recordRun(path, cellsOfDay(story, 0, box), 9, { xCm: 0, yCm: 0 });
		const { position, spikes } = await read(recording);
		const { result } = analyseSession(
			{ position, units: spikes.units, epochs: [] },
			sessionParameters({ arena: 'rectangle:100x80', shuffles: 20 })
		);
		expect(result.decoding.medianErrorCm).toBeLessThan(14);
		expect(result.decoding.chanceMedianErrorCm).toBeGreaterThan(30);
	});
});

/** Fields at the very ends are cut off by where the animal turns. */
const inside = (xCm: number) => xCm > 25 && xCm < 275;
