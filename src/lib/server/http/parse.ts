import type { z } from 'zod';
import { Invalid, NotFound, TooLarge } from '$lib/server/errors';
import { parsed } from '$lib/server/parsed';
import { BadRequest, UnsupportedType } from './protocol-refusals';

/** A day's tallies or the widest implant take a tenth of this. */
const JSON_LIMIT_BYTES = 1024 * 1024;

/** A parameter of the wrong shape names nothing that could exist. @throws NotFound */
export function parseParams<S extends z.ZodType>(schema: S, params: unknown): z.output<S> {
	const read = schema.safeParse(params);
	if (read.success) return read.data;
	// A word that is not of a closed list is explained; anything else just names nothing.
	const [issue] = read.error.issues;
	throw new NotFound(issue.code === 'invalid_value' ? issue.message : undefined);
}

/** Query or headers by their schema. @throws BadRequest naming each */
export function parseNamed<S extends z.ZodObject>(
	schema: S,
	named: Iterable<[string, string]>
): z.output<S> {
	try {
		return parsed(schema, Object.fromEntries(named));
	} catch (fault) {
		throw fault instanceof Invalid ? new BadRequest(fault.issues) : fault;
	}
}

/** @throws BadRequest when it is no JSON, Invalid naming each field */
export function parseBody<S extends z.ZodType>(schema: S, text: string): z.output<S> {
	let sent: unknown;
	try {
		sent = JSON.parse(text);
	} catch (cause) {
		const reason = cause instanceof Error ? cause.message : 'unreadable';
		throw new BadRequest([{ field: '', message: `The body is not JSON: ${reason}.` }]);
	}
	return parsed(schema, sent);
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
