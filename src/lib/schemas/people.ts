import { z } from 'zod';
import { TOKEN_SCOPES } from './enumerations';
import { labNameSchema, timeZoneSchema } from './lab-settings';
import { mailAddressSchema } from './mail-address';
import { newPasswordSchema } from './password';
import { roleSchema } from './roles';

export const personNameSchema = z
	.string()
	.trim()
	.min(1, 'Give a name.')
	.max(120, 'Keep the name within 120 characters.');

export const inviteSchema = z.object({
	email: mailAddressSchema,
	name: personNameSchema,
	roles: z.array(roleSchema).min(1, 'Choose at least one role.')
});
export type Invite = z.infer<typeof inviteSchema>;

/** Typed twice: a new password cannot be seen while it is typed. */
const samePassword = {
	check: (pair: { password: string; passwordAgain: string }) =>
		pair.password === pair.passwordAgain,
	words: { path: ['passwordAgain'], message: 'The two passwords differ.' }
};

export const acceptSchema = z
	.object({ name: personNameSchema, password: newPasswordSchema, passwordAgain: z.string() })
	.refine(samePassword.check, samePassword.words);
export type Accept = Pick<z.infer<typeof acceptSchema>, 'name' | 'password'>;

/** The first PI of an empty lab, and what the lab is called. */
export const firstSchema = z
	.object({
		labName: labNameSchema,
		timeZone: timeZoneSchema,
		name: personNameSchema,
		email: mailAddressSchema,
		password: newPasswordSchema,
		passwordAgain: z.string()
	})
	.refine(samePassword.check, samePassword.words);
export type First = Omit<z.infer<typeof firstSchema>, 'passwordAgain'>;

export const resetRequestSchema = z.object({ email: mailAddressSchema });

export const passwordPairSchema = z
	.object({ password: newPasswordSchema, passwordAgain: z.string() })
	.refine(samePassword.check, samePassword.words);

export const passwordChangeSchema = z
	.object({
		currentPassword: z.string().min(1, 'Type the password you have now.').max(1000),
		password: newPasswordSchema,
		passwordAgain: z.string()
	})
	.refine(samePassword.check, samePassword.words);
export type PasswordChange = Omit<z.infer<typeof passwordChangeSchema>, 'passwordAgain'>;

export const profileSchema = z.object({
	name: personNameSchema,
	/** Empty: the lab's. */
	timeZone: z.union([z.literal(''), timeZoneSchema]),
	revision: z.coerce.number().int().min(0)
});
export type ProfileChange = z.infer<typeof profileSchema>;

export const tokenSchema = z.object({
	name: z
		.string()
		.trim()
		.min(1, 'Say what the token is for.')
		.max(120, 'Keep this within 120 characters.'),
	scope: z.enum(TOKEN_SCOPES).default('read'),
	days: z.coerce
		.number({ message: 'Give a number of days.' })
		.int('Give whole days.')
		.min(1, 'A token lives for at least one day.')
		.max(366, 'A token lives for at most 366 days; make a new one each year.')
		.default(90)
});
export type NewToken = z.infer<typeof tokenSchema>;
