import type { z } from 'zod';
import type { Permission } from '$lib/server/access';

/**
 * One call of the API: what the route checks and answers by, and what the OpenAPI document says.
 * Both read this one description, so they cannot drift apart.
 */
export interface Operation {
	/** Names the call in generated clients; stays once shipped. */
	id: string;
	method: 'GET' | 'POST' | 'PUT';
	/** As in the OpenAPI document, like `/api/v1/animals/{code}`. */
	path: `/api/v1/${string}`;
	tag: string;
	summary: string;
	description?: string;
	/** Asked before anything of the call is read; the service asks again. */
	permission: Permission;
	params?: z.ZodObject;
	query?: z.ZodObject;
	headers?: z.ZodObject;
	/** JSON of the body. */
	body?: z.ZodType;
	/** An empty body stands for `{}`. */
	isBodyOptional?: boolean;
	/** Media types of a body that is a file instead. */
	file?: Readonly<Record<string, string>>;
	status: 200 | 201 | 202;
	answer: z.ZodType;
	answerHeaders?: Readonly<Record<string, string>>;
	/** Refusals beyond those of every call, by status. */
	refusals?: Readonly<Record<number, string>>;
}

export function operation<const O extends Operation>(described: O): O {
	return described;
}
