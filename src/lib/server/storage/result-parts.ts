import { Readable } from 'node:stream';
import { NotFound } from '$lib/server/errors';
import { storage } from '$lib/server/storage';

/**
 * The arrays of a result in one kept file, in parts that pages fetch one by one: an index of fixed
 * length as JSON (name to first and last byte), then the parts.
 */
const INDEX_BYTES = 1024;

export async function putParts(parts: Record<string, Uint8Array>): Promise<string> {
	const index: Record<string, [number, number]> = {};
	let at = INDEX_BYTES;
	for (const [name, bytes] of Object.entries(parts)) {
		index[name] = [at, at + bytes.length - 1];
		at += bytes.length;
	}
	const head = Buffer.alloc(INDEX_BYTES, ' ');
	const text = JSON.stringify(index);
	if (text.length > INDEX_BYTES) throw new RangeError('too many parts for the index');
	head.write(text);
	const content = Readable.from([head, ...Object.values(parts)], { objectMode: false });
	return (await storage().put(content)).sha256;
}

/** @throws NotFound for a part that the result does not have */
export async function readPart(
	sha256: string,
	name: string
): Promise<{ content: Readable; bytes: number }> {
	const head = await storage().read(sha256, { start: 0, end: INDEX_BYTES - 1 });
	const index: Record<string, [number, number]> = JSON.parse(
		Buffer.concat(await head.toArray()).toString()
	);
	if (!Object.hasOwn(index, name)) throw new NotFound('This result has no such part.');
	const [start, end] = index[name];
	return { content: await storage().read(sha256, { start, end }), bytes: end - start + 1 };
}
