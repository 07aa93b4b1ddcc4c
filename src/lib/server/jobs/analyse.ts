import * as runs from '$lib/server/services/analysis-runs';
import type { JobContext } from './handlers';
import { inThread } from './threads';

/** Progress is written at most this often: each write wakes every listening page. */
const TELL_EVERY_MS = 500;

/**
 * Computes one queued analysis in a thread. Handing the same job out twice is harmless: only a
 * queued analysis can be begun, and only the run that holds it can end it.
 */
export async function analyse(
	{ analysisId }: { analysisId: string },
	{ jobId, lock, running, signal }: JobContext
): Promise<void> {
	running.add(analysisId);
	try {
		const run = await runs.begin(analysisId, { lock, jobId });
		if (!run) return;
		try {
			const output = await inThread('analyse', run.input, { signal, onProgress: teller(run) });
			if ('refused' in output) await runs.refuse(run, output.refused);
			else await runs.finish(run, output);
		} catch (fault) {
			if (signal.aborted) await runs.lay(run);
			else await runs.stumble(run, fault);
		}
	} finally {
		running.delete(analysisId);
	}
}

/** Progress is a courtesy: where it cannot be written, the run goes on and ends or fails by itself. */
function teller(run: runs.Run): (share: number) => void {
	let toldAt = performance.now();
	return (share) => {
		if (performance.now() - toldAt < TELL_EVERY_MS) return;
		toldAt = performance.now();
		runs.tell(run, share).catch(() => undefined);
	};
}
