import { expect, test } from 'vitest';
import { initials } from './initials';

test.each([
	['Ada Byron Lovelace', 'AL'],
	['Plato', 'P'],
	['  émile   zola ', 'ÉZ'],
	['', '']
])('%j is shown as %j', (name, shown) => {
	expect(initials(name)).toBe(shown);
});
