import { expect, test } from 'vitest';
import { rasterPath } from './raster-path';

test('ticks stand where the spikes were', () => {
	expect(rasterPath([1, 4], (cm) => cm * 10, 5, 8)).toBe('M10 5v8M40 5v8');
});

test('spikes on one half pixel are one tick, undefined places none', () => {
	expect(rasterPath([1, 1.01, Number.NaN], (cm) => cm * 10, 0, 8)).toBe('M10 0v8');
});
