import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { samplesByUnit } from '../spikes/samples-by-unit';
import { pearson } from '../statistics/pearson';
import { gaussianKernel } from './gaussian-kernel';
import { halfCounts, halfMaps, halfRoom, type HalvedDay } from './half-maps';
import { gridSmoother, plainGridSmoother } from './smooth-line';

const BINS_X = 11;
const BINS_Y = 6;
const UNITS = 10;

function day(): HalvedDay {
	const random = seeded(8);
	const samples = 6000;
	const weights = gaussianKernel(1.5);
	const smooth = gridSmoother(BINS_X, BINS_Y, weights, 'zero');
	const timeS = Float64Array.from({ length: 4000 }, () => random.next() * 310 - 5).sort();
	return {
		tS: Float64Array.from({ length: samples }, (_, i) => i * 0.05),
		bin: Int32Array.from({ length: samples }, () => random.below(BINS_X * BINS_Y - 5)),
		sampleS: 0.05,
		spikes: { timeS, unit: Uint16Array.from(timeS, () => random.below(UNITS)), units: UNITS },
		smooth: Object.assign(smooth, {
			separable: { binsX: BINS_X, binsY: BINS_Y, weights, isRing: false }
		}),
		blockS: 30,
		leastHz: 1e-3
	};
}

describe('halfMaps', () => {
	it('equals maps drawn one by one, however units and spikes are shared out', () => {
		const input = day();
		const { tS, bin, spikes, smooth } = input;
		const parts = [0, 1500, 4000].slice(1).map((to, k) => {
			const counts = new Int32Array(halfRoom(input));
			halfCounts(input, [0, 1500][k], to, counts);
			return counts;
		});
		const shares = [halfMaps(input, parts, 0, 4), halfMaps(input, parts, 4, UNITS)];
		const splitHalfR = shares.flatMap((share) => [...(share?.splitHalfR ?? [])]);
		const ratesHz = shares.flatMap((share) => [...(share?.ratesHz ?? [])]);
		const bins = BINS_X * BINS_Y;
		samplesByUnit(spikes, tS, 0, UNITS).forEach((samples, u) => {
			const seconds = [new Float64Array(bins), new Float64Array(bins)];
			const counts = [new Float64Array(bins), new Float64Array(bins)];
			const half = (i: number) => Math.floor(tS[i] / 30) & 1;
			bin.forEach((k, i) => (seconds[half(i)][k] += 0.05));
			for (const i of samples) counts[half(i)][bin[i]]++;
			const visited = seconds.map((s) => s.slice());
			for (const map of [...seconds, ...counts]) smooth(map, map);
			const halves = [0, 1].map((h) =>
				counts[h].map((count, k) => Math.max(1e-3, count / seconds[h][k]))
			);
			const isInBoth = (k: number) => visited[0][k] > 0 && visited[1][k] > 0;
			const [a, b] = halves.map((map) => map.filter((_, k) => isInBoth(k)));
			expect(splitHalfR[u]).toBeCloseTo(pearson(a, b), 5);
			for (let k = 0; k < bins; k++) {
				const rate = (counts[0][k] + counts[1][k]) / (seconds[0][k] + seconds[1][k]);
				const isVisited = visited[0][k] + visited[1][k] > 0;
				if (isVisited) expect(ratesHz[u * bins + k]).toBeCloseTo(Math.max(1e-3, rate), 5);
				else expect(ratesHz[u * bins + k]).toBeNaN();
			}
		});
	});
});

describe('gridSmoother', () => {
	it.each([
		[50, 50, 2.5],
		[7, 3, 1.5],
		[8, 16, 0.4],
		[33, 2, 4]
	])('is the same to the last bit compiled and plain, %s × %s at %s bins', (x, y, sigma) => {
		const random = seeded(2);
		const map = Float64Array.from({ length: x * y }, () => random.next());
		const weights = gaussianKernel(sigma);
		const [compiled, plain] = [new Float64Array(x * y), new Float64Array(x * y)];
		gridSmoother(x, y, weights, 'zero')(map, compiled);
		plainGridSmoother(x, y, weights, 'zero')(map, plain);
		expect(compiled).toEqual(plain);
	});
});
