import { afterEach, beforeEach, describe, expect, inject, it } from 'vitest';
import { queueConnection, type QueueConnection } from '$lib/server/jobs/queue-connection';
import { withClient } from '../../../src/commands/cluster/roles';

let queue: QueueConnection;
beforeEach(() => {
	queue = queueConnection(() => undefined);
});
afterEach(() => queue.close());

describe('the queue’s connection', () => {
	it('sends a statement again when the server ended the connection under it', async () => {
		const { rows } = await queue.executeSql('SELECT pg_backend_pid() AS pid');
		const answer = queue.executeSql('SELECT pg_sleep(0.5), 7 AS seven');
		await withClient(inject('superUrl'), (client) =>
			client.query('SELECT pg_terminate_backend($1)', [rows[0].pid])
		);
		expect((await answer).rows[0].seven).toBe(7);
	});

	it('lets a report come to nothing after it was closed', async () => {
		const closed = queueConnection(() => undefined);
		await closed.close();
		expect((await closed.executeSql('SELECT 1')).rows).toEqual([]);
	});

	it('says at once what the database refuses', async () => {
		await expect(queue.executeSql('SELECT nothing FROM nowhere')).rejects.toThrow('nowhere');
	});
});
