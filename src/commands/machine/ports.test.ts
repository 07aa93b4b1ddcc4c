import { createServer, type Server } from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { anyFreePort, firstFreePort, isPortFree } from './ports';

const open: Server[] = [];
afterEach(() =>
	Promise.all(open.splice(0).map((server) => new Promise((done) => server.close(done))))
);

function occupy(port: number, host: string): Promise<number> {
	return new Promise((resolve, reject) => {
		const server = createServer();
		open.push(server);
		server.once('error', reject);
		server.listen(port, host, () => resolve(port));
	});
}

const OUTGOING_FROM = 32_768;

describe('ports', () => {
	it('picks a free port that no outgoing connection is given', async () => {
		for (let k = 0; k < 20; k++) expect(await anyFreePort()).toBeLessThan(OUTGOING_FROM);
	});

	it('sees a port as taken while somebody listens on it and free afterwards', async () => {
		const port = await occupy(await anyFreePort(), '127.0.0.1');
		expect(await isPortFree(port)).toBe(false);
		await new Promise((done) => open.pop()?.close(done));
		expect(await isPortFree(port)).toBe(true);
	});

	it('sees a program that listens on every address', async () => {
		const port = await occupy(await anyFreePort(), '0.0.0.0');
		expect(await isPortFree(port)).toBe(false);
	});

	it('goes upward past taken ports', async () => {
		const port = await occupy(await anyFreePort(), '127.0.0.1');
		expect(await firstFreePort(port)).toBeGreaterThan(port);
	});
});
