import { db } from '$lib/server/db';
import { holdWorkerLock } from '$lib/server/jobs/worker-lock';
import * as runs from '$lib/server/services/analysis-runs';

/** A worker that begins the analysis it is given and never ends: to be killed by a test. */
db();
const lock = await holdWorkerLock();
await runs.begin(process.argv[2], { lock: lock.number, jobId: crypto.randomUUID() });
process.stdout.write('running\n');
setInterval(() => undefined, 1000);
