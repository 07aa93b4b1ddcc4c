import { z } from 'zod';

export const PASSWORD_MIN = 12;

/** Long enough for the length rule and still tried first by anyone who guesses. */
const COMMON = new Set([
	'123456789012',
	'1234567890123',
	'12345678901234',
	'111111111111',
	'000000000000',
	'1q2w3e4r5t6y',
	'qwertyuiop12',
	'qwertyuiopas',
	'abcdefghijkl',
	'password1234',
	'password12345',
	'passwordpassword',
	'iloveyou1234',
	'letmein12345',
	'administrator',
	'welcome12345',
	'changeme1234',
	'correcthorsebatterystaple',
	'quarterturn1',
	'quarterturn12',
	'quarterturnquarterturn'
]);

const plain = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, '');

/** Length counts more than symbols: NIST SP 800-63B asks for no mixture of characters. */
export const newPasswordSchema = z
	.string()
	.min(PASSWORD_MIN, `Use at least ${PASSWORD_MIN} characters; a few words are easy to keep.`)
	.max(200, 'Use at most 200 characters.')
	.refine((password) => !COMMON.has(plain(password)), {
		message: 'This password is among the first anyone would try. Choose another.'
	})
	.refine((password) => new Set(password).size > 3, {
		message: 'Use more than three different characters.'
	});

/** Whether a password gives itself away by being the mail address or its first part. */
export function isOwnAddress(password: string, email: string): boolean {
	const given = plain(password);
	const local = plain(email.split('@')[0]);
	return (
		given === plain(email) || (local !== '' && given !== '' && given.replaceAll(local, '') === '')
	);
}
