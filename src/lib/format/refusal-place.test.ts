import { expect, it } from 'vitest';
import { refusalPlace } from './refusal-place';

it.each([
	[7, 'x_cm', 'Row 7, column x_cm: '],
	[7, null, 'Row 7: '],
	[null, 'x_cm', 'Column x_cm: '],
	[null, null, '']
])('row %s and column %s read "%s"', (row, column, words) => {
	expect(refusalPlace({ row, column })).toBe(words);
});
