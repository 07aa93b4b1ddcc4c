import type { ServerInit } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import { closeDb, db } from '$lib/server/db';
import { readActor } from '$lib/server/hooks/actor';
import { reportFault } from '$lib/server/hooks/fault';
import { refuseForeignForms } from '$lib/server/hooks/same-origin';
import { protect } from '$lib/server/hooks/security-headers';
import { applyTheme } from '$lib/server/hooks/theme';
import { closeQueue } from '$lib/server/jobs/enqueue';
import { closeThreads } from '$lib/server/jobs/threads';
import { closeLive } from '$lib/server/services/live';
import * as signIns from '$lib/server/services/sign-ins';

export const init: ServerInit = async () => {
	await db().authenticate();
	await signIns.sweep();
	// Open lines of pages would keep the server from closing until they time out.
	for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, closeLive);
	process.once('sveltekit:shutdown', async () => {
		await closeThreads();
		await closeQueue();
		await closeDb();
	});
};

export const handle = sequence(protect, refuseForeignForms, applyTheme, readActor);

export const handleError = reportFault;
