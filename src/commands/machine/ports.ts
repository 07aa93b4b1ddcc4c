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

/**
 * Where free ports are looked for: below those that systems hand to outgoing connections (32768 and up
 * on Linux, 49152 by RFC 6335), one of which could take the port while a killed server starts again.
 */
const PICKED = { from: 20_000, to: 32_768 };

/** A port nobody uses now, anywhere in the range, so that programs that start together seldom meet. */
export async function anyFreePort(): Promise<number> {
	for (;;) {
		const port = PICKED.from + Math.floor((PICKED.to - PICKED.from) * Math.random());
		if (await isPortFree(port)) return port;
	}
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
