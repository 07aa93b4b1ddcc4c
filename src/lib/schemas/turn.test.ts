import { describe, expect, it } from 'vitest';
import { turnSchema } from './turn';

const fieldsOf = (input: unknown) =>
	turnSchema.safeParse(input).error?.issues.map(({ path }) => path.join('.'));

describe('turnSchema', () => {
	it('reads turns as people write them', () => {
		expect(turnSchema.parse({ carriage: 'C01', turns: '-1/8' }).turns).toBe(-0.125);
		expect(turnSchema.parse({ carriage: 'C01', turns: -1e-5 }).turns).toBe(-0.00001);
		expect(turnSchema.parse({ carriage: 'C01', turns: 1 / 3 }).turns).toBe(0.33333);
	});

	it.each([['a bit'], [Infinity], [null], ['41']])('refuses %s turns', (turns) => {
		expect(fieldsOf({ carriage: 'C01', turns })).toEqual(['turns']);
	});

	it('asks for the carriage, except of a correction', () => {
		expect(fieldsOf({ turns: 1 })).toEqual(['carriage']);
		const replaces = '0196aa00-0000-7000-8000-000000000000';
		expect(fieldsOf({ turns: 0, replaces, reason: 'typed twice' })).toBeUndefined();
		expect(fieldsOf({ turns: 0, replaces })).toEqual(['reason']);
	});

	it('refuses a time without an offset', () => {
		expect(fieldsOf({ carriage: 'C01', turns: 1, doneAt: '2026-04-09T14:05:00' })).toEqual([
			'doneAt'
		]);
		const read = turnSchema.parse({
			carriage: 'C01',
			turns: 1,
			doneAt: '2026-04-09T14:05:00+02:00'
		});
		expect(read.doneAt?.toISOString()).toBe('2026-04-09T12:05:00.000Z');
	});
});
