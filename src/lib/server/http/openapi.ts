import { STATUS_CODES } from 'node:http';
import { createDocument, type ZodOpenApiOperationObject } from 'zod-openapi';
import { z } from 'zod';
import type { Operation } from '$lib/schemas/api/operation';
import { problemSchema } from '$lib/schemas/api/problem';
import { PERMISSIONS } from '$lib/server/access';

/** The OpenAPI 3.1 document of the calls, made from the schemas that check them. */
export function openApiDocument(operations: readonly Operation[], version: string) {
	const paths: Record<string, Record<string, ZodOpenApiOperationObject>> = {};
	for (const operation of operations) {
		paths[operation.path] ??= {};
		paths[operation.path][operation.method.toLowerCase()] = describe(operation);
	}
	return createDocument({
		openapi: '3.1.0',
		info: {
			title: 'Quarterturn',
			version,
			description:
				'The record of a laboratory, for its scripts. Make a token on your profile; it may do what you may, or read only. Lengths, times and voltages carry their unit in the name. Refusals are problem details (RFC 9457) with a stable `code`.',
			license: { name: 'MIT', identifier: 'MIT' }
		},
		servers: [{ url: '/' }],
		security: [{ token: [] }],
		components: { securitySchemes: { token: { type: 'http', scheme: 'bearer' } } },
		paths
	});
}

function describe(operation: Operation): ZodOpenApiOperationObject {
	const { params, query, body, file } = operation;
	const header = headersOf(operation);
	return {
		operationId: operation.id,
		tags: [operation.tag],
		summary: operation.summary,
		description: [operation.description, `Roles: ${PERMISSIONS[operation.permission].join(', ')}.`]
			.filter(Boolean)
			.join('\n\n'),
		requestParams: {
			...(params && { path: params }),
			...(query && { query }),
			...(header && { header })
		},
		...(body && {
			requestBody: {
				required: !operation.isBodyOptional,
				content: { 'application/json': { schema: body } }
			}
		}),
		...(file && { requestBody: { required: true, content: fileContent(file) } }),
		responses: {
			[operation.status]: {
				description: STATUS_CODES[operation.status] ?? '',
				content: { 'application/json': { schema: operation.answer } },
				...(operation.answerHeaders && { headers: answerHeaders(operation.answerHeaders) })
			},
			...refusalsOf(operation)
		}
	};
}

function headersOf({ method, headers }: Operation) {
	if (method !== 'POST') return headers;
	const key = z.string().min(1).max(200).optional().meta({
		description:
			'Sent again with the same key within 24 h, a request is answered as the first time and recorded once.'
	});
	return (headers ?? z.object({})).extend({ 'Idempotency-Key': key });
}

function fileContent(file: Readonly<Record<string, string>>) {
	return Object.fromEntries(
		Object.entries(file).map(([type, description]) => [
			type,
			{ schema: { type: 'string' as const, description } }
		])
	);
}

function answerHeaders(headers: Readonly<Record<string, string>>) {
	return Object.fromEntries(
		Object.entries(headers).map(([name, description]) => [
			name,
			{ description, schema: { type: 'string' as const } }
		])
	);
}

function refusalsOf({ params, query, body, file, method, refusals }: Operation) {
	const all = {
		401: 'No token, or one that is not valid',
		403: 'The person or the token may not do this',
		...(params && { 404: 'There is no such record, or it is not yours to see' }),
		...((query ?? body) && { 400: 'The request cannot be read; `issues` names what' }),
		...(body && {
			413: 'The body is too large',
			415: 'The body is not JSON',
			422: 'The input cannot be used; `issues` names each field'
		}),
		...(file && {
			413: 'The file is larger than the lab takes; nothing was kept',
			415: 'The format is not known',
			422: 'The file was refused; `file` names row and column; nothing was taken in'
		}),
		...(method === 'POST' && { 409: 'The record or the Idempotency-Key forbids it; see `code`' }),
		429: 'Too many calls; wait as long as Retry-After says',
		default: 'A fault of the server: 500 with its number, 503 while the database is away',
		...refusals
	};
	return Object.fromEntries(
		Object.entries<string>(all).map(([status, description]) => [
			status,
			{ description, content: { 'application/problem+json': { schema: problemSchema } } }
		])
	);
}
