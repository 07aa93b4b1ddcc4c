import { z } from 'zod';

/** Kept in small letters: people type their address with and without capitals. */
export const mailAddressSchema = z
	.string()
	.trim()
	.toLowerCase()
	.max(254, 'This is longer than a mail address can be.')
	.pipe(z.email('Not a mail address, like ada@lab.example.'));
