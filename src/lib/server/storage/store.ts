import type { Readable } from 'node:stream';

/** What a finished original is known by. */
export interface Kept {
	sha256: string;
	bytes: number;
}

/** Bytes from `start` up to and including `end`, as in an HTTP range. */
export interface ByteRange {
	start: number;
	end: number;
}

/** Where originals and large results are kept, each under the SHA-256 of its content. */
export interface Store {
	/**
	 * Keeps a stream whole or not at all; the same content twice is kept once.
	 * @throws whatever the stream throws; then nothing is kept
	 */
	put(content: Readable): Promise<Kept>;
	/** @throws NotFound when nothing is kept under the digest */
	read(sha256: string, range?: ByteRange): Promise<Readable>;
	has(sha256: string): Promise<boolean>;
	/** Resolves when the store can be written to. @throws with the reason when it cannot */
	health(): Promise<void>;
}

/** The key of a digest: two leading characters spread a large store over 256 folders. */
export function keyOf(sha256: string): string {
	if (!/^[0-9a-f]{64}$/.test(sha256)) throw new RangeError('a digest is 64 hexadecimal digits');
	return `${sha256.slice(0, 2)}/${sha256}`;
}
