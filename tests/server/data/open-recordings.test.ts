import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startWorker, type Worker } from '$lib/server/jobs/worker';
import * as analyses from '$lib/server/services/analyses';
import * as sessions from '$lib/server/services/sessions';
import * as sortings from '$lib/server/services/sortings';
import { put } from '$lib/server/services/take-in';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeArena } from '../../factories/arena';
import { ended, fileOf, fixture, type Person } from './lab';

interface Reference {
	n_units: number;
	units: Record<string, { used_spikes: number; si_smooth: number | null }>;
	decoding: {
		tau_s: number;
		units: number;
		windows: number;
		median_error_cm: number;
		chance_median_error_cm: number;
	}[];
}

let worker: Worker;
let by: Person;
let animal: string;

beforeAll(async () => {
	by = await makeActor('pi');
	animal = (await makeAnimal({ code: 'INSTALL' })).code;
	worker = await startWorker();
});

afterAll(() => worker.stop());

const reference = (folder: string): Reference =>
	JSON.parse(readFileSync(fixture(folder, 'reference.json'), 'utf8'));

async function takeInRecording(
	folder: string,
	description: string,
	positions: string,
	clockS: number
) {
	const arena = await makeArena({ name: folder, description });
	// Both ran on one clock on one day; the hour is not known.
	const clockZeroAt = new Date('2017-07-08T09:00:00Z');
	const { id, day } = await sessions.create(by, animal, {
		startsAt: new Date(clockZeroAt.getTime() + clockS * 1000),
		clockZeroAt,
		arena: arena.name
	});
	for (const [kind, name] of [
		['epochs', 'epochs.csv'],
		['position', positions],
		['spikes', 'spikes.csv']
	] as const) {
		await put(by, { sessionId: id, kind, name, content: fileOf(fixture(folder, name)) });
	}
	const [{ id: analysisId }] = await analyses.list(by, id);
	return { id, day, analysis: await ended(by, analysisId) };
}

describe('the open recordings, taken in and analysed by a worker', () => {
	it.each([
		['ca1-linear-track', 'straight:117', 'linear.csv', 4397],
		['ca1-w-maze', 'rectangle:104x90', 'position.csv', 0]
	])(
		'%s gives the reference figures',
		async (folder, description, positions, clockS) => {
			const { id, day, analysis } = await takeInRecording(folder, description, positions, clockS);
			expect(analysis.failure).toBeNull();
			expect(day).toBe('2017-07-08');
			const expected = reference(folder);
			const result = analysis.result;
			expect(result?.units).toHaveLength(expected.n_units);
			for (const unit of result?.units ?? []) {
				const peer = expected.units[unit.unit];
				expect(unit.spikesUsed, `unit ${unit.unit}`).toBe(peer.used_spikes);
				if (peer.si_smooth === null) expect(unit.informationBitsPerSpike).toBeNull();
				else
					expect(Math.abs(Number(unit.informationBitsPerSpike) - peer.si_smooth)).toBeLessThan(
						5.1e-5
					);
			}
			const view = await sessions.get(by, id);
			expect(view.currentAnalysisId).toBe(analysis.id);
			expect(view.analysis?.medianErrorCm).toBe(result?.decoding.medianErrorCm);
			expect(result?.inputs.position.sha256).toMatch(/^[0-9a-f]{64}$/);
			expect(await sortings.list(by, id)).toMatchObject([
				{ units: expected.n_units, isCurrent: true }
			]);
			const decoding = expected.decoding.find(({ tau_s }) => tau_s === 0.25);
			expect(result?.decoding.unitsUsed).toBe(decoding?.units);
			expect(result?.decoding.windows).toBe(decoding?.windows);
			expect(
				Math.abs(Number(result?.decoding.medianErrorCm) - Number(decoding?.median_error_cm))
			).toBeLessThan(0.001);
		},
		120_000
	);

	it('are two sessions and two sortings of one day', async () => {
		const rows = await sessions.list(by, { animal, day: '2017-07-08' });
		expect(rows).toHaveLength(2);
		expect(rows.map(({ files }) => files)).toEqual(
			Array(2).fill({ epochs: 'taken-in', position: 'taken-in', spikes: 'taken-in' })
		);
	});
});
