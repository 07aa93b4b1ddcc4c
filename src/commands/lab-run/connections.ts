/** Models speak to the database of this process only after it was opened. */
export async function openConnections(): Promise<void> {
	const { db } = await import('$lib/server/db');
	await db().authenticate();
}

/** Ends what services of the application opened in this process, so that it can end. */
export async function closeConnections(): Promise<void> {
	const { closeQueue } = await import('$lib/server/jobs/enqueue');
	const { closeDb } = await import('$lib/server/db');
	await closeQueue();
	await closeDb();
}
