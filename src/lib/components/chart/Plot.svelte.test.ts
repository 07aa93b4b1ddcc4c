import { fireEvent, render, screen } from '@testing-library/svelte';
import { beforeEach, expect, test, vi } from 'vitest';
import LineWithInterval from './LineWithInterval.svelte';
import type { LinePoint } from './line-point';

const points: LinePoint[] = [
	{ x: 0, y: 0.9, interval: [0.8, 1] },
	{ x: 1, y: null },
	{ x: 2, y: 0.7, interval: [0.6, 0.8] }
];

beforeEach(() => {
	// jsdom lays nothing out, so there is no size to observe.
	vi.stubGlobal(
		'ResizeObserver',
		class {
			observe = vi.fn();
			unobserve = vi.fn();
		}
	);
});

function show() {
	render(LineWithInterval, {
		points,
		label: 'Map correlation by day',
		xLabel: 'Day',
		yLabel: 'r',
		say: (point: LinePoint) => `D+${point.x}: ${point.y ?? 'no data'}`,
		references: [{ y: 0.08, label: 'shuffled units' }]
	});
	return screen.getByRole('slider', { name: 'Map correlation by day' });
}

test('arrow keys read every point, days without data too', async () => {
	const plot = show();
	const read: (string | null)[] = [];
	for (let step = 0; step < 3; step++) {
		await fireEvent.keyDown(plot, { key: 'ArrowRight' });
		read.push(plot.getAttribute('aria-valuetext'));
	}
	expect(read).toEqual(['D+0: 0.9', 'D+1: no data', 'D+2: 0.7']);
});

test('nothing is drawn where there are no data', () => {
	show();
	expect(document.querySelectorAll('circle')).toHaveLength(2);
});

test('a reference carries its own label', () => {
	show();
	expect(screen.getByText('shuffled units')).toBeTruthy();
});
