import { describe, expect, it } from 'vitest';
import { linearLight, luminance } from '../ui/contrast';
import { channels, tokens } from '../ui/tokens';
import { themeRamp, toOklab, type Ramp } from './ramp';

function colour(ramp: Ramp, at: number): [number, number, number] {
	return [ramp[at * 3], ramp[at * 3 + 1], ramp[at * 3 + 2]];
}

function lightness([r, g, b]: number[]): number {
	const y = 0.2126 * linearLight(r) + 0.7152 * linearLight(g) + 0.0722 * linearLight(b);
	return y > 0.008856 ? 116 * Math.cbrt(y) - 16 : 903.3 * y;
}

/** Full deuteranopia and protanopia in linear RGB (Machado, Oliveira & Fernandes 2009). */
const blindness = {
	deuteranopia: [
		[0.367322, 0.860646, -0.227968],
		[0.280085, 0.672501, 0.047413],
		[-0.01182, 0.04294, 0.968881]
	],
	protanopia: [
		[0.152286, 1.052583, -0.204868],
		[0.114503, 0.786281, 0.099216],
		[-0.003882, -0.048116, 1.051998]
	]
};

const every = Array.from({ length: 256 }, (_, i) => i);
const spaced = every.filter((i) => i % 17 === 0);

describe('OKLab', () => {
	it('has white at lightness 1 without colour, and red where its author puts it', () => {
		const [l, a, b] = toOklab([255, 255, 255]);
		expect([l, a, b].map((v) => Math.round(v * 1e4) / 1e4 + 0)).toEqual([1, 0, 0]);
		expect(toOklab([255, 0, 0])[0]).toBeCloseTo(0.628, 3);
	});
});

describe('daylight ramp', () => {
	const ramp = themeRamp('bench');

	it('moves by equal perceived steps', () => {
		const labs = spaced.map((i) => toOklab(colour(ramp, i)));
		const lengths = labs.slice(1).map((p, i) => Math.hypot(...p.map((v, k) => v - labs[i][k])));
		// What is left is the rounding to 8 bits, and chords where the ramp turns.
		expect(Math.max(...lengths) / Math.min(...lengths)).toBeLessThan(1.15);
	});

	it('grows lighter at every step, also to colour-blind eyes', () => {
		for (const matrix of [null, ...Object.values(blindness)]) {
			const seen = spaced.map((i) => {
				const light = colour(ramp, i).map(linearLight);
				const [r, g, b] = matrix
					? matrix.map((row) => row.reduce((sum, w, k) => sum + w * light[k], 0))
					: light;
				return 0.2126 * r + 0.7152 * g + 0.0722 * b;
			});
			for (let i = 1; i < seen.length; i++) expect(seen[i]).toBeGreaterThan(seen[i - 1]);
		}
	});
});

describe('red ramp', () => {
	const ramp = themeRamp('red');

	it('runs from black to the ink and never brighter', () => {
		expect(colour(ramp, 0)).toEqual([0, 0, 0]);
		expect(colour(ramp, 255)).toEqual(channels(tokens.red.ink));
		const most = luminance(tokens.red.ink) + 1e-9;
		for (const i of every) {
			const [r, g, b] = colour(ramp, i).map(linearLight);
			expect(0.2126 * r + 0.7152 * g + 0.0722 * b).toBeLessThanOrEqual(most);
		}
	});

	it('has even steps of lightness', () => {
		const steps = spaced
			.slice(1)
			.map((i) => lightness(colour(ramp, i)) - lightness(colour(ramp, i - 17)));
		expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(1.15);
	});
});
