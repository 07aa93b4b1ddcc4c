import { describe, expect, it } from 'vitest';
import { gaussianKernel } from '../maps/gaussian-kernel';
import { gridSmoother, lineSmoother } from '../maps/smooth-line';
import { seeded } from '../random/seeded';
import { quickCounts, quickDecode, quickRoom, type QuickDay } from './quick-decoder';
import { tilesOf } from './tiles';
import { foldStart } from './windows-from-zero';

const HZ = 20;

/** An animal that jumps about a grid, and units that each like one spot. */
function dayOf(binsX: number, binsY: number, units: number): QuickDay {
	const random = seeded(3, `${binsX} ${binsY}`);
	const samples = 200 * HZ;
	const tS = Float64Array.from({ length: samples }, (_, i) => i / HZ);
	const bin = new Int32Array(samples);
	let x = 0;
	let y = 0;
	for (let i = 0; i < samples; i++) {
		x = Math.max(0, Math.min(binsX - 2, x + random.below(3) - 1));
		y = Math.max(0, Math.min(binsY - 1, y + random.below(3) - 1));
		bin[i] = y * binsX + x;
	}
	const spots = Array.from({ length: units }, () => [random.below(binsX), random.below(binsY)]);
	const fired: [number, number][] = [];
	for (let i = 0; i < samples; i++) {
		spots.forEach(([spotX, spotY], u) => {
			const away = Math.hypot((bin[i] % binsX) - spotX, Math.floor(bin[i] / binsX) - spotY);
			if (random.next() < 0.5 * Math.exp(-(away * away) / 8)) {
				fired.push([(i + random.next()) / HZ, u]);
			}
		});
	}
	fired.sort((a, b) => a[0] - b[0]);
	const weights = gaussianKernel(1.5);
	const smooth =
		binsY > 1
			? gridSmoother(binsX, binsY, weights, 'zero')
			: lineSmoother({ count: binsX, lines: 1, stride: 1, between: 0 }, weights, 'zero');
	const bins = Int32Array.from({ length: binsX * binsY }, (_, k) => k);
	return {
		tS,
		bin,
		sampleS: 1 / HZ,
		spikes: {
			timeS: Float64Array.from(fired, ([timeS]) => timeS),
			unit: Uint16Array.from(fired, ([, unit]) => unit),
			units
		},
		smooth: Object.assign(smooth, { separable: { binsX, binsY, weights, isRing: false } }),
		centreXCm: Float64Array.from(bins, (k) => 2 * (k % binsX) + 1),
		centreYCm: Float64Array.from(bins, (k) => 2 * Math.floor(k / binsX) + 1),
		windows: 800,
		windowS: 0.25,
		folds: 4,
		leastHz: 1e-3
	};
}

/** The definition in double precision, place by place: ln p = Σ n ln f − τ Σ f. */
function plainly(day: QuickDay): { logs: number[][]; x: number[]; y: number[] } {
	const bins = day.centreXCm.length;
	const { timeS, unit, units } = day.spikes;
	const windowOf = (momentS: number) => Math.floor(momentS / day.windowS);
	const out = { logs: [] as number[][], x: [] as number[], y: [] as number[] };
	for (let fold = 0; fold < day.folds; fold++) {
		const [start, stop] = [foldStart(day, fold), foldStart(day, fold + 1)];
		const isOwn = (momentS: number) => windowOf(momentS) >= start && windowOf(momentS) < stop;
		const occupancyS = new Float64Array(bins);
		day.tS.forEach((t, i) => (occupancyS[day.bin[i]] += isOwn(t) ? 0 : 1));
		const smoothedS = new Float64Array(bins);
		day.smooth(occupancyS, smoothedS);
		const rates = Array.from({ length: units }, (_, u) => {
			const counts = new Float64Array(bins);
			timeS.forEach((t, k) => {
				const sample = Math.min(day.tS.length - 1, Math.floor(t * HZ + 1e-9));
				if (unit[k] === u && !isOwn(t)) counts[day.bin[sample]]++;
			});
			day.smooth(counts, counts);
			return counts.map((count, b) => Math.max(day.leastHz, (count * HZ) / smoothedS[b]));
		});
		for (let w = start; w < stop; w++) {
			const firing = [...unit.filter((_, k) => windowOf(timeS[k]) === w)];
			const logs = Array.from(occupancyS, (seconds, b) => {
				let sum = seconds > 0 ? 0 : -Infinity;
				for (const rate of rates) sum -= day.windowS * rate[b];
				for (const u of firing) sum += Math.log(rates[u][b]);
				return sum;
			});
			const top = Math.max(...logs);
			const weights = logs.map((log) => Math.exp(log - top));
			const total = weights.reduce((sum, weight) => sum + weight, 0);
			const meanOf = (centre: Float64Array) =>
				weights.reduce((sum, weight, b) => sum + weight * centre[b], 0) / total;
			out.logs.push(logs);
			out.x.push(meanOf(day.centreXCm));
			out.y.push(meanOf(day.centreYCm));
		}
	}
	return out;
}

function decoded(day: QuickDay, edges: readonly number[]) {
	const parts = edges.slice(1).map((to, k) => {
		const counts = new Int32Array(quickRoom(day));
		quickCounts(day, edges[k], to, counts);
		return counts;
	});
	const answers = edges.slice(1).flatMap((to, k) => quickDecode(day, parts, edges[k], to) ?? []);
	return {
		bin: answers.flatMap(({ bin }) => [...bin]),
		x: answers.flatMap(({ meanXCm }) => [...meanXCm]),
		y: answers.flatMap(({ meanYCm }) => [...meanYCm])
	};
}

describe('quickDecode', () => {
	it.each([
		[9, 7, 6],
		[13, 4, 5],
		[40, 1, 9]
	])('answers as the definition does, %s × %s bins, %s units', (binsX, binsY, units) => {
		const day = dayOf(binsX, binsY, units);
		const quick = decoded(day, [0, day.folds]);
		const plain = plainly(day);
		// Single precision may take the second of two places that are equally good.
		const short = quick.bin.map((bin, w) => Math.max(...plain.logs[w]) - plain.logs[w][bin]);
		expect(Math.max(...short)).toBeLessThan(1e-5);
		for (const axis of ['x', 'y'] as const) {
			const apart = quick[axis].map((value, w) => Math.abs(value - plain[axis][w]));
			expect(Math.max(...apart)).toBeLessThan(1e-3);
		}
	});

	it('answers the same however the folds are shared out', () => {
		const day = dayOf(9, 7, 6);
		expect(decoded(day, [0, 1, 4])).toEqual(decoded(day, [0, 4]));
	});
});

describe('tilesOf', () => {
	it('holds every bin once, and bins ascend within a tile', () => {
		const { bin, count, groups } = tilesOf(10, 6);
		expect([...bin].filter((k) => k >= 0).sort((a, b) => a - b)).toEqual([...Array(60).keys()]);
		expect([...bin.subarray(0, 6)]).toEqual([0, 1, 2, 3, 10, 11]);
		expect([count, groups, bin.length]).toEqual([6, 1, 256]);
	});
});
