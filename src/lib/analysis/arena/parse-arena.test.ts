import { describe, expect, it } from 'vitest';
import { ArenaError, parseArena } from './parse-arena';

describe('parseArena', () => {
	it('reads every kind of arena', () => {
		expect(parseArena('straight:300')).toEqual({ kind: 'straight', lengthCm: 300 });
		expect(parseArena('ring:250')).toEqual({ kind: 'ring', lengthCm: 250 });
		expect(parseArena('rectangle:100x80')).toEqual({
			kind: 'rectangle',
			widthCm: 100,
			heightCm: 80
		});
		expect(parseArena('disc:75')).toEqual({ kind: 'disc', diameterCm: 75 });
		expect(parseArena('polyline:0,0;120,0;120,80')).toMatchObject({ lengthCm: 200 });
	});

	it('joins the pieces of a tree at their shared points', () => {
		const tree = parseArena('tree:0,0>60,0;60,0>60,80;60,0>120,0');
		expect(tree).toMatchObject({
			kind: 'tree',
			lengthCm: 200,
			pieces: [
				{ from: 0, to: 1, startCm: 0, lengthCm: 60 },
				{ from: 1, to: 2, startCm: 60, lengthCm: 80 },
				{ from: 1, to: 3, startCm: 140, lengthCm: 60 }
			]
		});
	});

	it.each([
		['', 'no arena'],
		['oval:30', 'no arena'],
		['straight:', 'not a number'],
		['straight:-3', 'above zero'],
		['straight:1e9', 'too far'],
		['rectangle:100', 'WIDTHxHEIGHT'],
		['polyline:0,0', 'two points'],
		['polyline:0,0;0,0;1,1', 'twice in a row'],
		['tree:0,0>10,0;50,50>60,60', 'not joined'],
		['tree:0,0;10,0', 'no piece']
	])('refuses %j with a sentence', (text, part) => {
		expect(() => parseArena(text)).toThrow(ArenaError);
		expect(() => parseArena(text)).toThrow(part);
	});
});
