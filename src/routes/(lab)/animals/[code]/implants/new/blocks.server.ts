import type { ImplantForm } from '$lib/schemas/implant-form';
import { Invalid } from '$lib/server/errors';

/**
 * Says what is wrong with a bundle where it was typed: a fault in `sites[0].carriages[3].bundles[0].kind`
 * stands beside the list called `kind`, once however many bundles of a block share it.
 */
export async function toBlocks<T>(form: ImplantForm, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (fault) {
		if (!(fault instanceof Invalid)) throw fault;
		const issues = fault.issues.map(({ field, message }) => {
			const last = field.split('.').at(-1) ?? '';
			const named = field.startsWith('sites') ? ({ label: 'bundles' }[last] ?? last) : field;
			return { field: named in form ? named : '', message };
		});
		const seen = new Set<string>();
		throw new Invalid(
			issues.filter(({ field, message }) => {
				const isNew = !seen.has(field + message);
				seen.add(field + message);
				return isNew;
			})
		);
	}
}
