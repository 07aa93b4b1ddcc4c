import { expect, test } from 'vitest';
import { describeTurns, formatTurns } from './turns';

test.each([
	[0.25, '¼'],
	[-0.125, '−⅛'],
	[1.5, '1½'],
	[2, '2'],
	[0, '0'],
	[3 / 16, '3/16'],
	[1 + 1 / 16, '1 1/16'],
	[0.3, '0.300'],
	[1 / 3, '0.333']
])('%s turns read %s', (turns, text) => {
	expect(formatTurns(turns)).toBe(text);
});

test('words say when a screw was turned back', () => {
	expect(describeTurns(0.25)).toBe('¼ turn');
	expect(describeTurns(1)).toBe('1 turn');
	expect(describeTurns(1.25)).toBe('1¼ turns');
	expect(describeTurns(-0.125)).toBe('⅛ turn back');
});
