import { createImplant } from '$lib/schemas/api/implants';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as implants from '$lib/server/services/implants';

export const POST = endpoint(createImplant, async ({ by, params, body }) => {
	const { letter } = await implants.create(by, params.code, body);
	const { surgeryDay, ...view } = await implants.get(by, params.code, letter);
	return { ...view, surgeryDate: surgeryDay };
});

export const fallback = onlyTakes('POST');
