import { Invalid } from '$lib/server/errors';

/** Names the issues of a service that was given one part of a body by their place in the body. */
export async function issuesUnder<T>(field: string, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (fault) {
		if (!(fault instanceof Invalid)) throw fault;
		const issues = fault.issues.map((issue) => {
			const isItem = issue.field.startsWith('[');
			return { ...issue, field: isItem ? `${field}${issue.field}` : issue.field };
		});
		throw new Invalid(issues, fault.message, fault.code);
	}
}
