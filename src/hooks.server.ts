import type { ServerInit } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import { closeDb, db } from '$lib/server/db';
import { readActor } from '$lib/server/hooks/actor';
import { reportFault } from '$lib/server/hooks/fault';
import { protect } from '$lib/server/hooks/security-headers';
import { applyTheme } from '$lib/server/hooks/theme';
import { closeQueue } from '$lib/server/jobs/enqueue';
import * as signIns from '$lib/server/services/sign-ins';

export const init: ServerInit = async () => {
	await db().authenticate();
	await signIns.sweep();
	process.once('sveltekit:shutdown', async () => {
		await closeQueue();
		await closeDb();
	});
};

export const handle = sequence(protect, applyTheme, readActor);

export const handleError = reportFault;
