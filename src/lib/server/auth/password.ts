import { hash, verify } from '@node-rs/argon2';

/** Argon2id as OWASP's Password Storage Cheat Sheet advises: 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
	return hash(password, COST);
}

let decoy: Promise<string> | undefined;

/**
 * Does the same work when there is no hash to compare with, so that the time of an
 * answer does not tell whether an address belongs to somebody.
 */
export async function isPassword(stored: string | null, password: string): Promise<boolean> {
	decoy ??= hashPassword('nobody has this password');
	const isRight = await verify(stored ?? (await decoy), password);
	return stored !== null && isRight;
}
