import { Busboy } from '@fastify/busboy';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Invalid } from '$lib/server/errors';

interface SentFile {
	name: string;
	content: Readable;
	/** Fields that came before the file. */
	fields: ReadonlyMap<string, string>;
}

/**
 * Reads an HTML form with files as it arrives: `request.formData()` would hold every byte in memory.
 * Files are handled one after the other, empty file fields not at all.
 * @throws whatever `work` throws; Invalid when the form is none
 */
export async function eachFile<T>(
	request: Request,
	work: (file: SentFile) => Promise<T>
): Promise<T[]> {
	const type = request.headers.get('content-type') ?? '';
	if (!request.body || !type.startsWith('multipart/form-data')) {
		throw new Invalid([{ field: '', message: 'Choose a file first.' }]);
	}
	const parser = new Busboy({ headers: { 'content-type': type } });
	const fields = new Map<string, string>();
	const handled: Promise<T>[] = [];
	parser.on('field', (name, value) => fields.set(name, value));
	parser.on('file', (_, content, name) => {
		if (!name) {
			content.resume();
			return;
		}
		const done = work({ name, content, fields: new Map(fields) });
		// What is refused is read to its end, so that the browser gets to read the answer.
		done.catch(() => content.resume());
		handled.push(done);
	});
	const body = Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0]);
	try {
		await pipeline(body, parser);
	} catch (fault) {
		await Promise.allSettled(handled);
		throw fault;
	}
	return Promise.all(handled);
}
