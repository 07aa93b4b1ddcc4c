import { describe, expect, it } from 'vitest';
import { Forbidden, Unauthenticated } from '$lib/server/errors';
import * as analyses from '$lib/server/services/analyses';
import * as runs from '$lib/server/services/analysis-runs';
import * as jobs from '$lib/server/services/jobs';
import { makeActor } from '../../factories/actor';
import { makeAnalysis } from '../../factories/analysis';
import { makeBench, send, spikes, walk } from './lab';

/** An analysis that stumbled until it was given up. */
async function failed(): Promise<string> {
	const { id } = await makeAnalysis();
	const run = await runs.begin(id, { lock: 1, jobId: crypto.randomUUID() });
	if (!run) throw new Error('The analysis was not queued');
	await runs.stumble({ ...run, attempt: 1 }, new Error('first'));
	for (let attempt = 2; attempt <= runs.MOST_ATTEMPTS; attempt++) {
		const next = await runs.begin(id, { lock: 1, jobId: crypto.randomUUID() });
		if (next) await runs.stumble(next, new Error(`try ${attempt}`));
	}
	return id;
}

describe('the list of jobs', () => {
	it('is for PIs and admins', async () => {
		await expect(jobs.list(null)).rejects.toThrow(Unauthenticated);
		for (const role of ['observer', 'experimenter', 'surgeon', 'welfare'] as const) {
			await expect(jobs.list(await makeActor(role))).rejects.toThrow(Forbidden);
		}
	});

	it('counts what waits in each queue', async () => {
		const bench = await makeBench();
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		const { queues, analyses: open, workers } = await jobs.list(await makeActor('pi'));
		expect(queues.find(({ queue }) => queue === 'analyse')?.waiting).toBeGreaterThan(0);
		expect(queues.map(({ queue }) => queue)).toContain('send-mail');
		expect(open).toContainEqual(
			expect.objectContaining({
				state: 'queued',
				session: { id: bench.sessionId, animal: bench.animal, day: '2026-03-02' }
			})
		);
		expect(workers).toBe(0);
	});

	it('tells an admin why something failed, but not of which animal, and lets them retry', async () => {
		const id = await failed();
		const admin = await makeActor('admin');
		const { analyses: open } = await jobs.list(admin);
		const job = open.find((one) => one.id === id);
		expect(job).toMatchObject({ state: 'failed', session: null, failure: { canRetry: true } });
		expect(job?.failure?.message).toContain('try 3');
		await analyses.retry(admin, id);
		const after = (await jobs.list(admin)).analyses.find((one) => one.id === id);
		expect(after).toMatchObject({ state: 'queued', attempts: 0, failure: null });
	});
});

describe('trying again', () => {
	it('is for those who record and those who mend jobs', async () => {
		const id = await failed();
		await expect(analyses.retry(null, id)).rejects.toThrow(Unauthenticated);
		await expect(analyses.retry(await makeActor('observer'), id)).rejects.toThrow(Forbidden);
		await analyses.retry(await makeActor('experimenter'), id);
		await expect(analyses.retry(await makeActor('pi'), id)).rejects.toThrow(/that failed/);
	});
});

describe('a run that its worker lays down', () => {
	it('is queued again and the try does not count', async () => {
		const { id } = await makeAnalysis();
		const run = await runs.begin(id, { lock: 1, jobId: crypto.randomUUID() });
		if (run) await runs.lay(run);
		const next = await runs.begin(id, { lock: 2, jobId: crypto.randomUUID() });
		expect(next?.attempt).toBe(1);
	});

	it('can write nothing once another worker has it', async () => {
		const { id, sessionId } = await makeAnalysis();
		const first = await runs.begin(id, { lock: 1, jobId: crypto.randomUUID() });
		if (!first) throw new Error('The analysis was not queued');
		await runs.stumble(first, new Error('slow'));
		const second = await runs.begin(id, { lock: 2, jobId: crypto.randomUUID() });
		await runs.refuse(first, { code: 'late', message: 'too late' });
		await runs.tell(first, 0.9);
		const by = await makeActor('pi');
		expect(second?.attempt).toBe(2);
		expect(await analyses.list(by, sessionId)).toMatchObject([
			{ state: 'running', progress: 0, failure: null }
		]);
	});
});
