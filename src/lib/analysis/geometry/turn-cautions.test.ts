import { describe, expect, it } from 'vitest';
import { turnCautions } from './turn-cautions';

const screw = { pitchUm: 320, smallestStepTurns: 0.125 };

describe('turnCautions', () => {
	it('asks nothing about a small step down with travel to spare', () => {
		expect(turnCautions(0.25, 0.25, 2000, screw)).toEqual([]);
	});

	it.each([
		[1, []],
		[1.0625, ['more-than-one-turn']],
		[-2, ['more-than-one-turn', 'reverses']]
	])('asks about %d turns', (turns, asked) => {
		expect(turnCautions(turns, 0.5, 2000, screw)).toEqual(asked);
	});

	it('asks about a change of direction either way', () => {
		expect(turnCautions(0.25, -0.25, 2000, screw)).toEqual(['reverses']);
		expect(turnCautions(-0.25, -0.25, 2000, screw)).toEqual([]);
		expect(turnCautions(-0.25, 0, 2000, screw)).toEqual(['reverses']);
	});

	it('says when less than one step and 100 µm are left', () => {
		expect(turnCautions(0.25, 0.25, 140, screw)).toEqual([]);
		expect(turnCautions(0.25, 0.25, 139.9, screw)).toEqual(['little-travel-left']);
	});
});
