import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { afterEach, describe, expect, it, inject } from 'vitest';
import { startWorker, type Worker } from '$lib/server/jobs/worker';
import { Analysis } from '$lib/server/models/analysis';
import * as analyses from '$lib/server/services/analyses';
import * as live from '$lib/server/services/live';
import * as runs from '$lib/server/services/analysis-runs';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeAnalysis } from '../../factories/analysis';
import { ended, makeBench, send, spikes, walk, type Bench } from './lab';

let worker: Worker | undefined;
let child: ChildProcess | undefined;

afterEach(async () => {
	await worker?.stop();
	worker = undefined;
	child?.kill('SIGKILL');
	child = undefined;
});

/** A session whose analysis is queued. */
async function queued(bench: Bench): Promise<string> {
	await send(bench, 'position', walk());
	await send(bench, 'spikes', spikes());
	const [{ id }] = await analyses.list(bench.by, bench.sessionId);
	return id;
}

async function until(holds: () => Promise<boolean>, withinMs: number): Promise<number> {
	const from = performance.now();
	while (!(await holds())) {
		if (performance.now() - from > withinMs) throw new Error('It did not come true in time');
		await new Promise((resolve) => setTimeout(resolve, 100));
	}
	return performance.now() - from;
}

describe('a worker', () => {
	it('computes what was queued and tells those who listen', async () => {
		const bench = await makeBench();
		const heard: unknown[] = [];
		const stop = await live.listen(bench.by, bench.sessionId, { animal: bench.animal }, (note) =>
			heard.push(note)
		);
		await until(async () => heard.includes('again'), 5000);
		const id = await queued(bench);
		worker = await startWorker();
		const done = await ended(bench.by, id);
		stop();
		live.closeLive();
		expect(done).toMatchObject({ state: 'done', progress: 1, isCurrent: true, failure: null });
		expect(done.result?.schema).toBe('quarterturn/session-analysis@1');
		expect(heard).toContainEqual({ kind: 'analysis', id, sessionId: bench.sessionId });
	}, 60_000);

	it('fails what its inputs make impossible, with the reason and no retry', async () => {
		const bench = await makeBench('straight:10');
		const id = await queued(bench);
		worker = await startWorker();
		const failed = await ended(bench.by, id);
		expect(failed.failure).toMatchObject({ code: 'outside-arena', canRetry: false });
		expect(failed.failure?.message).toMatch(/outside the arena/);
		expect(failed.result).toBeNull();
	}, 60_000);

	it('says plainly what one unit that never fires during running allows', async () => {
		const bench = await makeBench();
		// Ten seconds at rest, then running; the unit fires at rest.
		const rest = Array.from({ length: 200 }, (_, i) => `${(i / 20).toFixed(3)},0.00\n`);
		await send(bench, 'position', walk(120, 10).replace('x_cm\n', `x_cm\n${rest.join('')}`));
		await send(bench, 'spikes', 'unit,t_s\n7,2.01\n7,4.5\n7,5\n');
		const [{ id }] = await analyses.list(bench.by, bench.sessionId);
		worker = await startWorker();
		const { result, failure } = await ended(bench.by, id);
		expect(failure).toBeNull();
		expect(result?.units).toMatchObject([{ unit: '7', informationBitsPerSpike: null }]);
		expect(result?.decoding).toMatchObject({ unitsUsed: 0, medianErrorCm: null });
		expect(result?.warnings.join(' ')).toMatch(/position was not decoded/);
	}, 60_000);

	it('tries three times what stumbles, then says so; a person may try again', async () => {
		const bench = await makeBench();
		// Positions whose track is in no storage: every try stumbles.
		const { id } = await makeAnalysis({ sessionId: bench.sessionId });
		for (const attempt of [1, 2, 3]) {
			const run = await runs.begin(id, { lock: 1, jobId: crypto.randomUUID() });
			expect(run?.attempt).toBe(attempt);
			if (run) await runs.stumble(run, new Error('disk full'));
		}
		const failed = await analyses.get(bench.by, id);
		expect(failed.failure).toMatchObject({ code: 'computation-failed', canRetry: true });
		expect(failed.failure?.message).toMatch(/failed 3 times, last with: disk full/);
		await analyses.retry(bench.by, id);
		expect(await analyses.standing(bench.by, id)).toMatchObject({ state: 'queued', failure: null });
	});

	it('begins an analysis once, however often its job is handed out', async () => {
		const { id } = await makeAnalysis();
		const jobId = crypto.randomUUID();
		const [one, two] = await Promise.all([
			runs.begin(id, { lock: 1, jobId }),
			runs.begin(id, { lock: 2, jobId })
		]);
		expect([one, two].filter(Boolean)).toHaveLength(1);
	});
});

describe('an analysis whose worker was killed', () => {
	it('is found by another worker within ten seconds and computed', async () => {
		const bench = await makeBench();
		const id = await queued(bench);
		child = spawn(process.execPath, ['--import', 'tsx', 'tests/server/data/stuck-worker.ts', id], {
			env: { ...process.env, TSX_TSCONFIG_PATH: 'tsconfig.json' },
			stdio: ['ignore', 'pipe', 'inherit']
		});
		if (!child.stdout) throw new Error('The stuck worker has no output');
		await once(child.stdout, 'data');
		expect(await analyses.standing(bench.by, id)).toMatchObject({ state: 'running' });

		worker = await startWorker();
		await new Promise((resolve) => setTimeout(resolve, 6000));
		expect((await Analysis.findByPk(id))?.attempts, 'a living worker keeps its work').toBe(1);

		child.kill('SIGKILL');
		const tookMs = await until(
			async () => ((await Analysis.findByPk(id))?.attempts ?? 0) > 1,
			15_000
		);
		expect(tookMs).toBeLessThan(10_000);
		expect(await ended(bench.by, id)).toMatchObject({ state: 'done' });
	}, 120_000);
});

describe('a database that goes away', () => {
	it('costs no analysis: connections are made again and the job is done', async () => {
		const bench = await makeBench();
		worker = await startWorker();
		const name = new URL(process.env.DATABASE_URL ?? '').pathname.slice(1);
		const cut = () =>
			withClient(inject('superUrl'), (client) =>
				client.query('SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = $1', [
					name
				])
			);
		const id = await queued(bench);
		await cut();
		await new Promise((resolve) => setTimeout(resolve, 500));
		await cut().catch(() => undefined);
		const settled = async () => {
			const row = await Analysis.findByPk(id).catch(() => null);
			return row?.state === 'done';
		};
		await until(settled, 60_000);
		expect(await analyses.get(bench.by, id)).toMatchObject({ state: 'done', isCurrent: true });
	}, 120_000);
});
