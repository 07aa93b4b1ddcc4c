import { Transform, type Readable } from 'node:stream';
import { formatBytes } from '$lib/format/measure';
import { TooLarge } from '$lib/server/errors';
import { settings } from '$lib/server/settings';

/** @throws TooLarge when a length announced beforehand is over the limit */
export function refuseLength(bytes: number): void {
	const limit = settings().uploadLimitBytes;
	if (bytes > limit) throw tooLarge(limit);
}

function tooLarge(limit: number): TooLarge {
	return new TooLarge(
		`The file is larger than this lab takes (${formatBytes(limit)}). Nothing was kept. Split it, or ask whoever runs the server to raise UPLOAD_LIMIT_MB.`
	);
}

/** Passes a stream on and ends it with TooLarge once it exceeds the lab's limit. */
export function limited(content: Readable): Readable {
	const limit = settings().uploadLimitBytes;
	let bytes = 0;
	const gate = new Transform({
		transform(chunk: Buffer, _encoding, done) {
			bytes += chunk.length;
			if (bytes > limit) done(tooLarge(limit));
			else done(null, chunk);
		}
	});
	// The reader gets the fault from its own reading; one that comes before it has begun would find
	// nobody listening and end the process.
	gate.on('error', () => undefined);
	// Not pipeline: the source of a request must not be destroyed before its answer is sent.
	content.on('error', (fault) => gate.destroy(fault));
	const cutOff = () => gate.destroy(content.errored ?? new Error('The upload was cut off'));
	// A sender may be gone before we listen; such a stream says nothing any more.
	if (content.destroyed) return cutOff();
	content.on('close', () => {
		if (!content.readableEnded) cutOff();
	});
	return content.pipe(gate);
}
