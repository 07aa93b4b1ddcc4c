import { createServer } from 'node:net';

/** Both loopback families: a program on ::1 alone would answer for `localhost` in our place. */
const LOOPBACK = ['127.0.0.1', '::1'];

export async function isPortFree(port: number, hosts: string[] = LOOPBACK): Promise<boolean> {
	for (const host of hosts) if (!(await canListen(port, host))) return false;
	return true;
}

/** The first free port from `from` upward. */
export async function firstFreePort(from: number, hosts?: string[]): Promise<number> {
	for (let port = from; port <= 65_535; port++) if (await isPortFree(port, hosts)) return port;
	throw new Error(`No free port from ${from} upward`);
}

/** A port nobody uses now, picked by the system. */
export function anyFreePort(): Promise<number> {
	return new Promise((resolve, reject) => {
		const server = createServer();
		server.once('error', reject);
		server.listen(0, '127.0.0.1', () => {
			const address = server.address();
			const port = typeof address === 'object' && address ? address.port : 0;
			server.close(() => resolve(port));
		});
	});
}

function canListen(port: number, host: string): Promise<boolean> {
	return new Promise((resolve) => {
		const server = createServer();
		server.once('error', (error: NodeJS.ErrnoException) =>
			// A machine without IPv6 has no such address to be taken.
			resolve(error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT')
		);
		server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
	});
}
