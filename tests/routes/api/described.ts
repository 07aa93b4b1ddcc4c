import { expect } from 'vitest';
import { z } from 'zod';
import { operations } from '$lib/schemas/api/operations';
import { openApiDocument } from '$lib/server/http/openapi';

/** The document as a stranger reads it: text, without the schemas it was made from. */
const document = JSON.parse(JSON.stringify(openApiDocument(operations, '0')));

function find(operationId: string) {
	for (const methods of Object.values<Record<string, { operationId: string }>>(document.paths)) {
		for (const operation of Object.values(methods)) {
			if (operation.operationId === operationId) return z.json().parse(operation);
		}
	}
	throw new Error(`No operation ${operationId}`);
}

const answersSchema = z.object({
	responses: z.record(
		z.string(),
		z.object({ content: z.record(z.string(), z.object({ schema: z.json() })) })
	)
});

function withDefinitions(schema: unknown): z.core.JSONSchema.JSONSchema {
	const text = JSON.stringify({ ...Object(schema), $defs: document.components.schemas });
	return JSON.parse(text.replaceAll('#/components/schemas/', '#/$defs/'));
}

/**
 * Checks an answer against the published document: its status, its type, its shape.
 * @returns the answer's body
 */
export async function described(operationId: string, answer: Response) {
	const { responses } = answersSchema.parse(find(operationId));
	const type = answer.headers.get('content-type')?.split(';')[0] ?? '';
	expect(Object.keys(responses)).toContain(String(answer.status));
	expect(Object.keys(responses[answer.status].content)).toContain(type);
	const body = await answer.json();
	z.fromJSONSchema(withDefinitions(responses[answer.status].content[type].schema)).parse(body);
	return body;
}
