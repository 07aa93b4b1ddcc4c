import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { stretchOfSamples, usedStretches, type Epoch } from './epochs';
import { ringLaps, straightLaps } from './laps';
import { speedOf } from './speed';
import { standingTime } from './standing-time';
import { timeBlocks } from './time-blocks';

const epoch = (kind: Epoch['kind'], startS: number, stopS: number): Epoch => ({
	name: kind,
	kind,
	startS,
	stopS
});
const none = (length: number) => new Float64Array(length).fill(NaN);

describe('usedStretches', () => {
	it('takes all time when there is no run epoch, run epochs otherwise', () => {
		expect(usedStretches([epoch('rest', 0, 9)])).toEqual([{ startS: -Infinity, stopS: Infinity }]);
		expect(usedStretches([epoch('run', 5, 9), epoch('run', 0, 4), epoch('rest', 4, 5)])).toEqual([
			{ startS: 0, stopS: 4 },
			{ startS: 5, stopS: 9 }
		]);
	});

	it('cuts excluded time out of a run', () => {
		expect(usedStretches([epoch('run', 0, 9), epoch('excluded', 3, 4)])).toEqual([
			{ startS: 0, stopS: 3 },
			{ startS: 4, stopS: 9 }
		]);
	});

	it('holds its start and not its end', () => {
		const tS = Float64Array.of(0, 1, 2, 3, 4);
		const got = stretchOfSamples(tS, [
			{ startS: 1, stopS: 3 },
			{ startS: 3, stopS: 4 }
		]);
		expect([...got]).toEqual([-1, 0, 0, 1, -1]);
	});
});

describe('standingTime', () => {
	it('never counts time over a gap, and the last sample of a stretch for the median', () => {
		const tS = Float64Array.of(0, 0.03, 0.06, 50, 50.03);
		const got = standingTime(tS, Int32Array.of(0, 0, 0, 0, 1), 0.03);
		expect(worstDifference(got, [0.03, 0.03, 0.1, 0.03, 0.03])).toBeLessThan(1e-12);
	});
});

describe('speedOf', () => {
	const line = metricOf(parseArena('straight:100'));
	const plane = metricOf(parseArena('rectangle:100x100'));

	it('equals numpy.gradient on an even clock', () => {
		const { input, expected, tol } = referenceCase<
			{ dt: number; xy: [number, number][] },
			{ speed: number[] }
		>('01_position.json', 'speed_two_sided');
		const n = input.xy.length;
		const got = speedOf(
			Float64Array.from({ length: n }, (_, i) => i * input.dt),
			Float64Array.from(input.xy, ([x]) => x),
			Float64Array.from(input.xy, ([, y]) => y),
			new Int32Array(n),
			1,
			plane
		);
		expect(worstDifference(got, expected.speed)).toBeLessThan(tol * 10);
	});

	it('never reaches into another stretch', () => {
		const tS = Float64Array.of(0, 1, 2, 3);
		const got = speedOf(
			tS,
			Float64Array.of(0, 1, 90, 91),
			none(4),
			Int32Array.of(0, 0, 1, -1),
			8,
			line
		);
		expect([...got]).toEqual([1, 1, NaN, NaN]);
	});
});

describe('laps', () => {
	it('counts passes between the ends of a straight track and drops a turn-back', () => {
		const x = Float64Array.of(5, 30, 60, 95, 60, 95, 50, 5, 50, 95);
		const laps = straightLaps(x, new Int32Array(10), 100);
		expect(laps.count).toBe(3);
		expect([...laps.direction]).toEqual([0, 1, 1, 0, 0, 0, -1, 0, 1, 0]);
		expect([...laps.ofSample]).toEqual([0, 0, 0, 0, 0, 0, 1, 1, 2, 2]);
		expect([...laps.round]).toEqual([0, 0, 1]);
	});

	it('counts whole turns of a ring from where each stretch began', () => {
		const x = Float64Array.of(50, 80, 10, 49, 51, 90, 20, 60);
		const laps = ringLaps(x, Int32Array.of(0, 0, 0, 0, 0, 1, 1, 1), 100);
		expect([...laps.ofSample]).toEqual([0, 0, 0, 0, 1, 2, 2, 2]);
		expect(laps.count).toBe(3);
	});

	it('cuts time into blocks that never span two stretches', () => {
		const tS = Float64Array.of(0, 19, 20, 45, 100, 119);
		const { count, ofSample } = timeBlocks(tS, Int32Array.of(0, 0, 0, 0, 1, 1), 20);
		expect([...ofSample]).toEqual([0, 0, 1, 2, 3, 3]);
		expect(count).toBe(4);
	});
});
