import { once } from 'node:events';
import { openConnections } from './lab-run/connections';
import { joinLab } from './lab-run/join-lab';

/** `npm run worker`: takes jobs from the queue until told to stop; any number may run. */
export default async function worker(): Promise<number> {
	const leave = await joinLab();
	await openConnections();
	const { startWorker } = await import('$lib/server/jobs/worker');
	const running = await startWorker();
	console.log(`Worker ${process.pid} takes jobs.`);
	await Promise.race([once(process, 'SIGTERM'), once(process, 'SIGINT')]);
	await running.stop();
	await leave();
	return 0;
}
