import { z } from 'zod';
import { mailAddressSchema } from './mail-address';

export const signInSchema = z.object({
	email: mailAddressSchema,
	password: z.string().min(1, 'Type your password.').max(1000),
	next: z.string().max(2000).default('/')
});

export type SignIn = Pick<z.infer<typeof signInSchema>, 'email' | 'password'>;
