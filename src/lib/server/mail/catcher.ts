import { mkdir, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import { SMTPServer } from 'smtp-server';
import { v7 as uuidv7 } from 'uuid';

export interface Catcher {
	port: number;
	close(): Promise<void>;
}

/**
 * A mail server for labs that have none: it listens on this machine only, and what it is sent
 * becomes a file that any mail program opens. No mail leaves the machine.
 */
export async function openCatcher(folder: string): Promise<Catcher> {
	// Invitations and resets are in here: for the account that runs the server only.
	await mkdir(folder, { recursive: true, mode: 0o700 });
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['STARTTLS', 'AUTH'],
		onData(stream, _session, callback) {
			keep(folder, stream).then(
				() => callback(),
				(fault) => callback(fault instanceof Error ? fault : new Error(String(fault)))
			);
		}
	});
	await new Promise<void>((resolve, reject) => {
		server.once('error', reject);
		server.listen(0, '127.0.0.1', resolve);
	});
	const address = server.server.address();
	if (address === null || typeof address === 'string') throw new Error('The catcher has no port');
	return {
		port: address.port,
		close: () => new Promise((resolve) => server.close(resolve))
	};
}

/** Written aside first, so that a half-written file never looks like a mail. */
async function keep(folder: string, stream: NodeJS.ReadableStream): Promise<void> {
	const name = join(folder, uuidv7());
	await writeFile(`${name}.part`, await buffer(stream), { mode: 0o600 });
	await rename(`${name}.part`, `${name}.eml`);
}
