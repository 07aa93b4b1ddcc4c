import { expect, test } from 'vitest';
import { readHidden } from './data-table';

const known = ['strain', 'weight'];

test('hidden columns are read back, unknown ones forgotten', () => {
	expect(readHidden('["weight","gone"]', known)).toEqual(['weight']);
	expect(readHidden('[]', known)).toEqual([]);
});

test.each([null, 'not json', '{"weight":false}'])('%j leaves the columns as they come', (kept) => {
	expect(readHidden(kept, known)).toBeNull();
});
