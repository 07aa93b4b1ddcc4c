import { render, screen } from '@testing-library/svelte';
import { expect, test } from 'vitest';
import { stateLooks, type AdviceState } from './advice-state';
import StateShape from './StateShape.svelte';

const states = Object.keys(stateLooks) as AdviceState[];

test('no two states share a drawing: in the red room the shape is all there is', () => {
	const drawings = states.map((state) => {
		const { container, unmount } = render(StateShape, { state });
		const drawing = container
			.querySelector('svg')
			?.innerHTML.replaceAll(/<!--.*?-->/g, '')
			.trim();
		unmount();
		return drawing;
	});
	expect(new Set(drawings).size).toBe(states.length);
});

test.each(states)('%s is read out by its word when no word is shown', (state) => {
	render(StateShape, { state });
	expect(screen.getByRole('img', { name: stateLooks[state].label })).toBeTruthy();
});
