import { describe, expect, it } from 'vitest';
import { isOwnAddress, newPasswordSchema } from './password';

describe('a new password', () => {
	it.each(['shortshort1', 'aaaaaaaaaaaa', 'Password-1234', 'correct horse battery staple', ''])(
		'%j is refused',
		(password) => {
			expect(newPasswordSchema.safeParse(password).success).toBe(false);
		}
	);

	it.each(['a'.repeat(9) + 'bcd', 'lowering slowly', 'Ø æ å Ø æ å 12'])(
		'%j is taken as it is',
		(password) => {
			expect(newPasswordSchema.parse(password)).toBe(password);
		}
	);

	it('is not the mail address, nor its first part over and over', () => {
		expect(isOwnAddress('Ada@Lab.example', 'ada@lab.example')).toBe(true);
		expect(isOwnAddress('adaadaadaada', 'ada@lab.example')).toBe(true);
		expect(isOwnAddress('опускаем по чуть', 'ada@lab.example')).toBe(false);
		expect(isOwnAddress('ada lowers slowly', 'ada@lab.example')).toBe(false);
	});
});
