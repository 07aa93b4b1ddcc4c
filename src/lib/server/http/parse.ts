import type { z } from 'zod';
import { Invalid, NotFound, TooLarge, type Issue } from '$lib/server/errors';
import { BadRequest, UnsupportedType } from './protocol-refusals';

/** A day's tallies or the widest implant take a tenth of this. */
const JSON_LIMIT_BYTES = 1024 * 1024;

function issuesOf(error: z.ZodError): Issue[] {
	return error.issues.map(({ path, message }) => ({ field: path.join('.'), message }));
}

/** A parameter of the wrong shape names nothing that could exist. @throws NotFound */
export function parseParams<S extends z.ZodType>(schema: S, params: unknown): z.output<S> {
	const read = schema.safeParse(params);
	if (!read.success) throw new NotFound();
	return read.data;
}

/** @throws BadRequest naming each field; also for names the call does not know */
export function parseQuery<S extends z.ZodObject>(schema: S, query: URLSearchParams): z.output<S> {
	const read = schema.safeParse(Object.fromEntries(query));
	if (!read.success) throw new BadRequest(issuesOf(read.error));
	return read.data;
}

/** @throws BadRequest naming each header */
export function parseHeaders<S extends z.ZodObject>(schema: S, headers: Headers): z.output<S> {
	const read = schema.safeParse(Object.fromEntries(headers));
	if (!read.success) throw new BadRequest(issuesOf(read.error));
	return read.data;
}

/** @throws Invalid naming each field */
export function parseBody<S extends z.ZodType>(schema: S, text: string): z.output<S> {
	let sent: unknown;
	try {
		sent = JSON.parse(text);
	} catch (cause) {
		const reason = cause instanceof Error ? cause.message : 'unreadable';
		throw new BadRequest([{ field: '', message: `The body is not JSON: ${reason}.` }]);
	}
	const read = schema.safeParse(sent);
	if (!read.success) throw new Invalid(issuesOf(read.error));
	return read.data;
}

/** @throws UnsupportedType, TooLarge, BadRequest */
export async function readJsonText(request: Request): Promise<string> {
	const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase();
	if (type !== 'application/json') {
		throw new UnsupportedType('Send the body as JSON with Content-Type: application/json.');
	}
	if (Number(request.headers.get('content-length')) > JSON_LIMIT_BYTES) throw tooLarge();
	const decoder = new TextDecoder('utf-8', { fatal: true });
	let text = '';
	let bytes = 0;
	try {
		for await (const chunk of request.body ?? []) {
			bytes += chunk.length;
			if (bytes > JSON_LIMIT_BYTES) throw tooLarge();
			text += decoder.decode(chunk, { stream: true });
		}
		return text + decoder.decode();
	} catch (fault) {
		if (fault instanceof TypeError) {
			throw new BadRequest([{ field: '', message: 'The body is not text in UTF-8.' }]);
		}
		throw fault;
	}
}

function tooLarge(): TooLarge {
	return new TooLarge(
		`The body is larger than ${JSON_LIMIT_BYTES / 1024 / 1024} MB. Nothing was recorded. Files go to the files calls.`
	);
}
