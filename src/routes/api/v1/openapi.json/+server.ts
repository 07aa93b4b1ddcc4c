import { operations } from '$lib/schemas/api/operations';
import { onlyTakes } from '$lib/server/http/endpoint';
import { openApiDocument } from '$lib/server/http/openapi';
import { settings } from '$lib/server/settings';

/** Describes the calls and nothing of the record, so it needs no token. */
export const GET = () => Response.json(openApiDocument(operations, settings().version));

export const fallback = onlyTakes('GET');
