import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits, safe in an address: nobody guesses it, so no slow hash is needed to keep it. */
export function newSecret(): string {
	return randomBytes(32).toString('base64url');
}

/** What the database keeps of a secret: a stolen table opens nothing. */
export function hashSecret(secret: string): string {
	return createHash('sha256').update(secret).digest('hex');
}
