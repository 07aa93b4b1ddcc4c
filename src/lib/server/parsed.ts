import type { z } from 'zod';
import { Invalid } from './errors';

/**
 * Input by its schema. Forms check before they call; a service checks again, because the API and
 * the command line call it too.
 * @throws Invalid with one issue a field, "sites[0].label" for nested ones
 */
export function parsed<S extends z.ZodType>(schema: S, input: unknown): z.output<S> {
	const read = schema.safeParse(input);
	if (read.success) return read.data;
	throw new Invalid(
		read.error.issues.map(({ path, message }) => ({ field: fieldOf(path), message }))
	);
}

function fieldOf(path: PropertyKey[]): string {
	return path.reduce<string>((name, part) => {
		if (typeof part === 'number') return `${name}[${part}]`;
		return name ? `${name}.${String(part)}` : String(part);
	}, '');
}
