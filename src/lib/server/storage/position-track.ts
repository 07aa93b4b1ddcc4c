import { Readable } from 'node:stream';
import type { PositionInput } from '$lib/analysis/session/input';
import { storage } from '$lib/server/storage';

/** Bytes handed to storage at a time. */
const BLOCK_BYTES = 1 << 20;

/**
 * Positions as kept beside their original: one float64 telling how many coordinates there are
 * (1 or 2), then all t, all x and, with two, all y. Little-endian, as every machine we run on is.
 */
export async function putTrack({ tS, xCm, yCm }: PositionInput): Promise<string> {
	const parts = [Float64Array.of(yCm ? 2 : 1), tS, xCm, ...(yCm ? [yCm] : [])];
	function* blocks(): Generator<Buffer> {
		for (const part of parts) {
			const bytes = Buffer.from(part.buffer, part.byteOffset, part.byteLength);
			for (let at = 0; at < bytes.length; at += BLOCK_BYTES) {
				yield bytes.subarray(at, at + BLOCK_BYTES);
			}
		}
	}
	const { sha256 } = await storage().put(Readable.from(blocks(), { objectMode: false }));
	return sha256;
}

/** @param samples how many there are, as the row of the file says */
export async function readTrack(sha256: string, samples: number): Promise<PositionInput> {
	// Room for both coordinates; a track of one leaves the last third unused.
	const all = new Float64Array(1 + 3 * samples);
	const bytes = new Uint8Array(all.buffer);
	let at = 0;
	for await (const block of await storage().read(sha256)) {
		bytes.set(block, at);
		at += block.length;
	}
	const coordinates = all[0];
	if (at !== 8 * (1 + (1 + coordinates) * samples)) {
		throw new Error(
			`The kept track ${sha256} has ${at} bytes, which does not fit ${samples} samples`
		);
	}
	const column = (k: number) => all.subarray(1 + k * samples, 1 + (k + 1) * samples);
	return { tS: column(0), xCm: column(1), yCm: coordinates === 2 ? column(2) : null };
}
