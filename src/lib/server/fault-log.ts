import { randomBytes } from 'node:crypto';
import { now } from './clock';

/**
 * Writes an unexpected fault as one line of JSON, under a short id that a person can read out.
 * @param asked the route rather than the address: some addresses hold secrets
 */
export function logFault(
	thrown: unknown,
	asked: { method: string; route: string | null; personId?: string | null }
): string {
	const id = randomBytes(4).toString('hex');
	const fault = thrown instanceof Error ? thrown : new Error(String(thrown));
	const line = {
		at: now().toISOString(),
		fault: id,
		...asked,
		message: fault.message,
		stack: fault.stack,
		cause: fault.cause instanceof Error ? fault.cause.message : undefined
	};
	process.stderr.write(`${JSON.stringify(line)}\n`);
	return id;
}
