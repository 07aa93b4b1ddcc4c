import { describe, expect, it } from 'vitest';
import { readPastedTable } from './pasted-table';

const cellsOf = (text: string) => readPastedTable(text).lines.map((line) => line.cells);

describe('pasted table', () => {
	it.each([
		['tabs of a spreadsheet', 'R1\trat\n R2\tmouse', '\t'],
		['semicolons', 'R1;rat\nR2;mouse', ';'],
		['commas', 'R1,rat\r\nR2,mouse\r\n', ',']
	])('reads %s', (_, text, separator) => {
		expect(readPastedTable(text).separator).toBe(separator);
		expect(cellsOf(text)).toEqual([
			['R1', 'rat'],
			['R2', 'mouse']
		]);
	});

	it('keeps decimal commas where a stronger separator stands', () => {
		expect(cellsOf('R1\t285,5')).toEqual([['R1', '285,5']]);
	});

	it('keeps separators, breaks and doubled quotes inside quotes', () => {
		expect(cellsOf('R1,"calm, ""tame""\nlarge",x')).toEqual([['R1', 'calm, "tame"\nlarge', 'x']]);
	});

	it('leaves out empty lines and still counts them', () => {
		const { lines } = readPastedTable('\n\nR1,rat\n,\n\nR2,rat');
		expect(lines.map((line) => line.number)).toEqual([3, 6]);
	});

	it('finds nothing in nothing', () => {
		expect(readPastedTable(' \n ').lines).toEqual([]);
	});
});
