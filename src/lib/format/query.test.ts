import { expect, test } from 'vitest';
import { queryOf } from './query';

test('leaves out what is not set and escapes the rest', () => {
	expect(queryOf({ state: null, kind: 'a b&c', before: 0, to: undefined })).toBe(
		'kind=a+b%26c&before=0'
	);
});
