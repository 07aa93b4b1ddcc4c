import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { Unusable } from './unusable';

/** Bytes read at a time. */
const PIECE = 1 << 20;

/**
 * Reads a file piece by piece through `read` and gives the SHA-256 of all of it.
 * @throws Unusable when the file cannot be read
 */
export async function readHashed<T>(
	path: string,
	read: (chunks: AsyncIterable<Uint8Array>) => Promise<T>
): Promise<{ value: T; sha256: string }> {
	const hash = createHash('sha256');
	async function* pieces(): AsyncGenerator<Uint8Array> {
		try {
			for await (const piece of createReadStream(path, { highWaterMark: PIECE })) {
				hash.update(piece);
				yield piece;
			}
		} catch (error) {
			throw new Unusable(`${path}: ${reasonOf(error)}`);
		}
	}
	const value = await read(pieces());
	return { value, sha256: hash.digest('hex') };
}

/** Why a file cannot be read or written, in words. */
export function reasonOf(error: unknown): string {
	const code = error instanceof Error && 'code' in error ? error.code : undefined;
	if (code === 'ENOENT') return 'there is no such file';
	if (code === 'EISDIR') return 'this is a folder, not a file';
	if (code === 'EACCES') return 'permission denied';
	return error instanceof Error ? error.message : String(error);
}
