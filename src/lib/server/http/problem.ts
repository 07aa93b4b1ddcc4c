import { STATUS_CODES } from 'node:http';
import { ConnectionError } from 'sequelize';
import type { ProblemDocument } from '$lib/schemas/api/problem';
import { Invalid, RefusedFile, Refusal, TooMany, Unauthenticated } from '$lib/server/errors';
import { logFault } from '$lib/server/fault-log';
import { MethodNotAllowed } from './protocol-refusals';

/** Does the work and answers RFC 9457 problem details for whatever it throws. */
export async function withProblems(
	asked: { method: string; route: string },
	work: () => Promise<Response>
): Promise<Response> {
	try {
		return await work();
	} catch (fault) {
		if (fault instanceof Refusal) return problem(fault);
		const id = logFault(fault, asked);
		if (fault instanceof ConnectionError) return databaseAway(id);
		return document({
			status: 500,
			code: 'unexpected',
			detail:
				'Something failed on the server. Whether this call was recorded is not sure; look before you repeat it. Tell whoever runs the server the fault number.',
			id
		});
	}
}

export function problem(refusal: Refusal): Response {
	return document(
		{
			status: refusal.status,
			code: refusal.code,
			detail: refusal.message,
			...(refusal instanceof Invalid && { issues: refusal.issues }),
			...(refusal instanceof RefusedFile && { file: placeOf(refusal) })
		},
		headersOf(refusal)
	);
}

function placeOf({ refusal: { row, column } }: RefusedFile) {
	return { row, column };
}

function headersOf(refusal: Refusal): Record<string, string> {
	if (refusal instanceof TooMany) return { 'retry-after': String(Math.ceil(refusal.retryAfterS)) };
	if (refusal instanceof Unauthenticated) return { 'www-authenticate': 'Bearer' };
	if (refusal instanceof MethodNotAllowed) return { allow: refusal.allowed.join(', ') };
	return {};
}

function databaseAway(id: string): Response {
	return document(
		{
			status: 503,
			code: 'database-away',
			detail: 'The database does not answer at the moment. Try again shortly.',
			id
		},
		{ 'retry-after': '10' }
	);
}

function document(
	fields: Omit<ProblemDocument, 'type' | 'title'>,
	headers: Record<string, string> = {}
): Response {
	const body: ProblemDocument = {
		type: 'about:blank',
		title: STATUS_CODES[fields.status] ?? 'Refused',
		...fields
	};
	return new Response(JSON.stringify(body), {
		status: fields.status,
		headers: {
			'content-type': 'application/problem+json',
			'cache-control': 'no-store',
			...headers
		}
	});
}
