import { describe, expect, it } from 'vitest';
import { drawNormal } from '../random/normal-draw';
import { seeded } from '../random/seeded';
import { decodingChart, ERROR_CHART, type ErrorDay } from './decoding-chart';

const session = (lnError: number, over: Partial<ErrorDay> = {}): ErrorDay => ({
	task: 'circle',
	medianErrorCm: Math.exp(lnError),
	lnErrorSd: 0.1,
	...over
});
const BASELINE = [2.1, 1.9, 2, 2.1, 1.9, 2, 2.05, 1.95];

describe('decodingChart', () => {
	it('learns from eight sessions, then weighs the newest by 0.2 (worked by hand)', () => {
		const points = decodingChart([...BASELINE, 2.2, 2.2].map((y) => session(y)));
		expect(points.slice(0, 8).every((p) => Number.isNaN(p.z) && p.alarm === null)).toBe(true);
		// Mean 2; the baseline's own sd is .077, so the session's .1 stands: (2.2 − 2)/.1 = 2.
		expect(points[8].z).toBeCloseTo(0.4, 9);
		expect(points[9].z).toBeCloseTo(0.2 * 2 + 0.8 * 0.4, 9);
		// t₇ at the tail of 2.962 is 4.42668 (scipy.stats.t), √(1 + 1/8), and √(λ/(2 − λ)(1 − .8²)) = .2.
		expect(points[8].limit).toBeCloseTo(0.2 * 4.426683460061915 * Math.sqrt(1.125), 9);
	});

	it('takes the baseline’s own spread when it is the larger, or the laps gave none', () => {
		const wild = [1.5, 2.5, 1.5, 2.5, 1.5, 2.5, 1.5, 2.5].map((y) => session(y));
		const sd = 0.5 * Math.sqrt(8 / 7);
		for (const lnErrorSd of [0.01, NaN]) {
			const [point] = decodingChart([...wild, session(3, { lnErrorSd })]).slice(-1);
			expect(point.z).toBeCloseTo((0.2 * 1) / sd, 9);
		}
	});

	it('alarms when the error stays up, and when it stays down', () => {
		const up = decodingChart([...BASELINE, ...Array<number>(12).fill(2.6)].map((y) => session(y)));
		const down = decodingChart(
			[...BASELINE, ...Array<number>(12).fill(1.4)].map((y) => session(y))
		);
		expect(up.at(-1)?.alarm).toBe('risen');
		expect(down.at(-1)?.alarm).toBe('fallen');
	});

	it('starts anew on another task, and passes over a session that was not decoded', () => {
		const other = decodingChart([
			...BASELINE.map((y) => session(y)),
			session(2.5),
			session(2.5, { task: 'square' })
		]);
		expect(other[8].z).toBeGreaterThan(0);
		expect(other[9].z).toBeNaN();
		const gapped = decodingChart([
			...BASELINE.map((y) => session(y)),
			session(2.2),
			session(0, { medianErrorCm: NaN }),
			session(2.2)
		]);
		expect(gapped[9].y).toBeNaN();
		expect(gapped[10].z).toBeCloseTo(0.72, 9);
	});

	it('rarely alarms on sessions like its baseline', () => {
		const random = seeded(6);
		let alarmed = 0;
		for (let animal = 0; animal < 400; animal++) {
			const sessions = Array.from({ length: 38 }, () => session(2 + 0.1 * drawNormal(random)));
			if (decodingChart(sessions).some((point) => point.alarm !== null)) alarmed++;
		}
		// 30 charted sessions of a known baseline at one in 500 would give about 6 %.
		expect(alarmed / 400).toBeLessThan(0.1);
	});

	it('refuses an error of 0 and a baseline of two sessions', () => {
		expect(() => decodingChart([session(0, { medianErrorCm: 0 })])).toThrow(RangeError);
		expect(() => decodingChart([], { ...ERROR_CHART, baseline: 2 })).toThrow(RangeError);
		expect(() => decodingChart([], { ...ERROR_CHART, lambda: 0 })).toThrow(RangeError);
	});
});
