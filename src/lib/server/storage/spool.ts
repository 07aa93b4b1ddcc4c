import { createHash, randomUUID } from 'node:crypto';
import { mkdir, open, rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import type { Kept } from './store';

export interface Spooled extends Kept {
	path: string;
}

/**
 * Writes a stream to a file of its own in `folder`, hashing on the way, and flushes it to the disk.
 * A stream that fails or is cut off leaves no file.
 */
export async function spool(content: Readable, folder: string): Promise<Spooled> {
	await mkdir(folder, { recursive: true });
	const path = join(folder, randomUUID());
	const hash = createHash('sha256');
	let bytes = 0;
	const file = await open(path, 'wx');
	try {
		for await (const chunk of content) {
			const block = Buffer.isBuffer(chunk) ? chunk : Buffer.from(chunk);
			hash.update(block);
			await file.writeFile(block);
			bytes += block.length;
		}
		await file.sync();
	} catch (fault) {
		await file.close();
		await rm(path, { force: true });
		throw fault;
	}
	await file.close();
	return { path, sha256: hash.digest('hex'), bytes };
}
