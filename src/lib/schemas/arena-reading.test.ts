import { describe, expect, it } from 'vitest';
import { readArena } from './arena-reading';

describe('reading of an arena', () => {
	it.each([
		['straight:300', 5, 'straight track, 300 cm, 60 bins of 5 cm'],
		['ring:250', 5, 'ring, 250 cm around, 50 bins of 5 cm'],
		['rectangle:100x80', 4, 'rectangle, 100 × 80 cm, 25 × 20 bins of 4 cm'],
		['disc:75', 2.5, 'disc, 75 cm across, 30 × 30 bins of 2.5 cm'],
		['polyline:0,0;120,0;120,80', 5, 'bent track of 2 pieces, 200 cm, 40 bins of 5 cm'],
		[
			'tree:0,0>60,0;60,0>60,80;60,0>120,0',
			10,
			'branched track of 3 pieces, 200 cm, 20 bins of 10 cm'
		]
	])('says what %s is', (description, binCm, words) => {
		expect(readArena(description, binCm)).toEqual({ isReadable: true, words });
	});

	it('says the shape alone while no bin is given', () => {
		expect(readArena('straight:300', null).words).toBe('straight track, 300 cm');
	});

	it.each(['', 'straight', 'straight:-3', 'rectangle:100', 'tree:0,0>1,0;5,5>6,6', 'maze:3'])(
		'cannot read "%s" and says why',
		(description) => {
			const reading = readArena(description, 5);
			expect(reading.isReadable).toBe(false);
			expect(reading.words.length).toBeGreaterThan(10);
		}
	);

	it('refuses a bin wider than the arena', () => {
		expect(readArena('straight:30', 50).isReadable).toBe(false);
	});
});
