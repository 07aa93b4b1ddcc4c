import { getAnimal } from '$lib/schemas/api/animals';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as animals from '$lib/server/services/animals';

export const GET = endpoint(getAnimal, ({ by, params }) => animals.get(by, params.code));

export const fallback = onlyTakes('GET');
