import { render, screen } from '@testing-library/svelte';
import { expect, test } from 'vitest';
import TurnGlyph from './TurnGlyph.svelte';

function wedge(): SVGPathElement {
	const path = document.querySelector('path');
	if (!path) throw new Error('The glyph has no wedge.');
	return path;
}

test('a quarter is labelled in words and filled from twelve to three', () => {
	render(TurnGlyph, { turns: 0.25 });
	expect(screen.getByRole('img', { name: '¼ turn' })).toBeTruthy();
	expect(wedge().getAttribute('d')).toBe('M10 10V2A8 8 0 0 1 18 10z');
	expect(wedge().classList.contains('fill-brass-fill')).toBe(true);
});

test('turning back is outlined, never filled', () => {
	render(TurnGlyph, { turns: -0.125 });
	expect(screen.getByRole('img', { name: '⅛ turn back' })).toBeTruthy();
	expect(wedge().classList.contains('fill-none')).toBe(true);
});

test.each([
	[1, ''],
	[2, '2×'],
	[1.25, '1+']
])('%s turns show the count %j', (turns, count) => {
	render(TurnGlyph, { turns });
	expect(screen.getByRole('img').textContent?.trim()).toBe(count);
});

test('beside its own words the glyph is silent', () => {
	render(TurnGlyph, { turns: 0.25, hasLabel: false });
	expect(screen.queryByRole('img')).toBeNull();
});
