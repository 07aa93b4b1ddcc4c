import { describe, expect, it } from 'vitest';
import { parseTurns } from './parse-turns';
import { formatTurns } from './turns';

describe('parseTurns', () => {
	it.each([
		['1/4', 0.25],
		['-1/8', -0.125],
		['0.5', 0.5],
		['0,5', 0.5],
		['.25', 0.25],
		['2', 2],
		['+3/16', 0.1875],
		['1 1/2', 1.5],
		['-1 1/2', -1.5],
		['1½', 1.5],
		['−⅛', -0.125],
		['– ¼', -0.25],
		[' ¾ ', 0.75],
		['1/3', 0.33333],
		['5/4', 1.25]
	])('reads %s', (text, turns) => {
		expect(parseTurns(text)).toBe(turns);
	});

	it.each([
		'',
		' ',
		'a quarter',
		'1/0',
		'1/4/2',
		'--1',
		'1.2.3',
		'1e3',
		'1 2',
		'NaN',
		'0x1',
		'1/-4'
	])('does not guess at "%s"', (text) => {
		expect(parseTurns(text)).toBeUndefined();
	});

	it('reads nothing turned as 0, not −0', () => {
		expect(Object.is(parseTurns('-0'), 0)).toBe(true);
	});

	it('reads back every amount that is shown in sixteenths', () => {
		for (let sixteenths = -48; sixteenths <= 48; sixteenths++) {
			expect(parseTurns(formatTurns(sixteenths / 16))).toBe(sixteenths / 16);
		}
	});
});
