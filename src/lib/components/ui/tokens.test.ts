import { describe, expect, it, test } from 'vitest';
import { contrastRatio, linearLight, luminance } from './contrast';
import { channels, themes, tokens, type Token } from './tokens';

/** Text in front of what it is written on; WCAG 2.2, 1.4.3 asks for 4.5. */
const textPairs: [Token, Token][] = [
	...(['ink', 'soft', 'trace', 'fault', 'hold', 'watch', 'advance', 'parked'] as const).flatMap(
		(front) =>
			(['paper', 'enamel', 'well', 'layer'] as const).map((back): [Token, Token] => [front, back])
	),
	['ink', 'enamel-deep'],
	['soft', 'enamel-deep'],
	['brass', 'paper'],
	['paper', 'ink'],
	['paper', 'fault']
];

/** Outlines of controls and marks that carry meaning; WCAG 2.2, 1.4.11 asks for 3. */
const graphicPairs: [Token, Token][] = [
	...(['edge', 'brass', 'ink'] as const).flatMap((front) =>
		(['paper', 'enamel', 'well', 'layer'] as const).map((back): [Token, Token] => [front, back])
	),
	['ink', 'enamel-deep'],
	['brass', 'enamel-deep'],
	['brass-fill', 'paper']
];

describe('contrast by the WCAG formula', () => {
	it('gives the published ratios', () => {
		expect(contrastRatio('#767676', '#ffffff')).toBeCloseTo(4.542225, 5);
		expect(contrastRatio('#777777', '#ffffff')).toBeCloseTo(4.478089, 5);
		expect(contrastRatio('#949494', '#ffffff')).toBeCloseTo(3.03347, 5);
		expect(contrastRatio('#000000', '#ffffff')).toBe(21);
	});
});

describe.each(themes)('%s', (theme) => {
	const colours = tokens[theme];

	test.each(textPairs)('%s on %s can be read', (front, back) => {
		expect(contrastRatio(colours[front], colours[back])).toBeGreaterThanOrEqual(4.5);
	});

	test.each(graphicPairs)('%s on %s can be seen', (front, back) => {
		expect(contrastRatio(colours[front], colours[back])).toBeGreaterThanOrEqual(3);
	});
});

describe('red room', () => {
	const inkLight = channels(tokens.red.ink).map(linearLight);

	test.each(Object.entries(tokens.red))(
		'%s carries no more green or blue than the ink does',
		(_, hex) => {
			const [r, g, b] = channels(hex).map(linearLight);
			// The ink's own small share is what lifts it to 4.5:1 for secondary text beside it.
			expect(g).toBeLessThanOrEqual((inkLight[1] / inkLight[0]) * r + 1e-3);
			expect(b).toBeLessThanOrEqual((inkLight[2] / inkLight[0]) * r + 1e-3);
		}
	);

	test.each(['enamel', 'enamel-deep', 'paper', 'well', 'layer'] as const)(
		'%s stays dark however large it is',
		(surface) => {
			expect(luminance(tokens.red[surface])).toBeLessThan(luminance(tokens.red.ink) / 20);
		}
	);

	test.each(Object.entries(tokens.red))('%s is not brighter than the ink', (_, hex) => {
		expect(luminance(hex)).toBeLessThanOrEqual(luminance(tokens.red.ink));
	});
});
