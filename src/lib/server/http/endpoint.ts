import { createHash } from 'node:crypto';
import type { z } from 'zod';
import type { Operation } from '$lib/schemas/api/operation';
import { demand, type Actor } from '$lib/server/access';
import * as idempotencyKeys from '$lib/server/services/idempotency-keys';
import type { ApiEvent } from './api-event';
import { bearer } from './bearer';
import { parseBody, parseNamed, parseParams, readJsonText } from './parse';
import { problem, withProblems } from './problem';
import { BadRequest, MethodNotAllowed } from './protocol-refusals';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

export interface Call<O extends Operation> {
	by: Actor;
	params: Parsed<O['params']>;
	query: Parsed<O['query']>;
	headers: Parsed<O['headers']>;
	body: Parsed<O['body']>;
	/** For a body that is a file; it has not been read. */
	request: Request;
}

export type Endpoint = ((event: ApiEvent) => Promise<Response>) & { operation: Operation };

/**
 * A route's handler from the description of its call: token, permission, input, one service call,
 * answer through its schema. Whatever is thrown becomes problem details.
 * @param answerHeaders made from the answer, like an ETag or a Location
 */
export function endpoint<O extends Operation>(
	operation: O,
	work: (call: Call<O>) => Promise<z.input<O['answer']>>,
	answerHeaders: (answer: z.output<O['answer']>) => Record<string, string> = () => ({})
): Endpoint {
	const answer = async (event: ApiEvent) => {
		const by = await bearer(event.request);
		demand(by, operation.permission);
		const { text, ...input } = await read(operation, event);
		const perform = async (actor: Actor) => ({
			status: operation.status,
			body: operation.answer.parse(await work({ by: actor, request: event.request, ...input }))
		});
		const key = operation.method === 'POST' ? keyOf(event.request) : null;
		const { status, body } =
			key === null
				? await perform(by)
				: await idempotencyKeys.once(by, key, hashOf(event, text), perform);
		// Kept or new, the body came out of this very schema.
		const headers = answerHeaders(body as z.output<O['answer']>);
		return Response.json(body, { status, headers: { 'cache-control': 'no-store', ...headers } });
	};
	return Object.assign(
		(event: ApiEvent) =>
			withProblems({ method: operation.method, route: operation.path }, () => answer(event)),
		{ operation }
	);
}

async function read<O extends Operation>(operation: O, { request, url, params }: ApiEvent) {
	const parsed = {
		params: operation.params && parseParams(operation.params, params),
		query: operation.query && parseNamed(operation.query, url.searchParams),
		headers: operation.headers && parseNamed(operation.headers, request.headers)
	};
	const isLeftOut = operation.isBodyOptional && request.body === null;
	const text = isLeftOut ? '{}' : operation.body ? await readJsonText(request) : '';
	const body = operation.body && parseBody(operation.body, text);
	// Each part is parsed exactly where the operation has its schema; the compiler cannot follow that.
	return { ...parsed, body, text } as Omit<Call<O>, 'by' | 'request'> & { text: string };
}

function keyOf(request: Request): string | null {
	const key = request.headers.get('idempotency-key');
	if (key !== null && !/^[\x21-\x7e]{1,200}$/.test(key)) {
		throw new BadRequest([
			{ field: 'Idempotency-Key', message: 'Use 1 to 200 visible ASCII characters.' }
		]);
	}
	return key;
}

function hashOf({ request, url }: ApiEvent, text: string): string {
	return createHash('sha256')
		.update(`${request.method} ${url.pathname}${url.search}\n${text}`)
		.digest('hex');
}

/** For the methods an address does not take; Kit's own answer would be plain text. */
export function onlyTakes(...methods: Operation['method'][]): () => Response {
	return () => problem(new MethodNotAllowed(methods));
}
