import { expect, test } from 'vitest';
import { csvText } from './csv';

test('missing values are empty and never zero', () => {
	expect(
		csvText(
			['day', 'units'],
			[
				['D+1', 0],
				['D+2', null],
				['D+3', Number.NaN]
			]
		)
	).toBe('day,units\r\nD+1,0\r\nD+2,\r\nD+3,\r\n');
});

test('text with commas, quotes or line ends survives', () => {
	expect(csvText(['a'], [['x,y'], ['say "hi"'], ['two\nlines']])).toBe(
		'a\r\n"x,y"\r\n"say ""hi"""\r\n"two\nlines"\r\n'
	);
});
