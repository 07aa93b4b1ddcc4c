import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { resolve } from 'node:path';
import process from 'node:process';
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
			for await (const piece of createReadStream(fromWhereTyped(path), { highWaterMark: PIECE })) {
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

/** npm moves a script to the folder of the package; a path is meant from where it was typed. */
export function fromWhereTyped(path: string): string {
	const isScript = process.env.npm_lifecycle_event === 'analyse';
	return resolve((isScript && process.env.INIT_CWD) || process.cwd(), path);
}

/** Why a file cannot be read or written, in words. */
export function reasonOf(error: unknown): string {
	const code = error instanceof Error && 'code' in error ? error.code : undefined;
	if (code === 'ENOENT') return 'there is no such file';
	if (code === 'EISDIR') return 'this is a folder, not a file';
	if (code === 'EACCES') return 'permission denied';
	return error instanceof Error ? error.message : String(error);
}
