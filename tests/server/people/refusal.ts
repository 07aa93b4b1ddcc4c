import { Refusal } from '$lib/server/errors';

/** The refusal a call ends with; anything else fails the test. */
export async function refusalOf(call: Promise<unknown>): Promise<Refusal> {
	try {
		await call;
	} catch (fault) {
		if (fault instanceof Refusal) return fault;
		throw fault;
	}
	throw new Error('The call was not refused');
}
