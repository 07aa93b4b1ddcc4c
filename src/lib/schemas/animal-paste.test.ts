import { describe, expect, it } from 'vitest';
import { readPastedAnimals } from './animal-paste';

describe('pasted list of animals', () => {
	it('reads columns by their headings, in any order and spelling', () => {
		const { rows, refusal } = readPastedAnimals(
			'Sex\tCode\tBaseline (g)\tborn\tSPECIES\nm\tR031\t412,5\t14.02.2026\tRat'
		);
		expect(refusal).toBeNull();
		expect(rows[0].issues).toEqual([]);
		expect(rows[0].animal).toMatchObject({
			code: 'R031',
			sex: 'male',
			baselineWeightG: 412.5,
			birthDate: '2026-02-14',
			species: 'rat',
			status: 'in-lab'
		});
	});

	it('takes the usual order where there are no headings', () => {
		const { rows, columns } = readPastedAnimals('R031,rat,Long-Evans,female\nR032,mouse');
		expect(rows.map((row) => row.animal?.code)).toEqual(['R031', 'R032']);
		expect(columns).toEqual(['code', 'species', 'strain', 'sex']);
	});

	it.each([
		['a species nobody keeps', 'code,species\nR1,cat', 'species'],
		['a code with a space', 'code,species\nR 1,rat', 'code'],
		['a weight in words', 'code,species,weight\nR1,rat,heavy', 'weight'],
		['a weight of nothing', 'code,species,weight\nR1,rat,0', 'weight'],
		['a date that could be two days', 'code,species,born\nR1,rat,03/04/2026', 'born'],
		['a day that is not in the calendar', 'code,species,born\nR1,rat,31.02.2026', 'born']
	])('names the cell of %s', (_, text, column) => {
		const [row] = readPastedAnimals(text).rows;
		expect(row.animal).toBeNull();
		expect(row.issues.map((issue) => issue.column)).toContain(column);
	});

	it('says which line has the code already, whatever the case', () => {
		const { rows } = readPastedAnimals('code,species\nR31,rat\nr31,rat');
		expect(rows[1].issues[0].message).toBe('Line 2 has this code already.');
	});

	it('refuses an unknown heading rather than dropping its column', () => {
		expect(readPastedAnimals('code,species,cage\nR1,rat,7').refusal).toContain('cage');
	});

	it('refuses a line with more cells than columns', () => {
		const [row] = readPastedAnimals('code,species\nR1,rat,7').rows;
		expect(row.issues[0].message).toContain('More cells');
	});

	it.each(['', '  \n ', 'code,species'])('finds no animal in "%s"', (text) => {
		expect(readPastedAnimals(text).refusal).not.toBeNull();
	});
});
