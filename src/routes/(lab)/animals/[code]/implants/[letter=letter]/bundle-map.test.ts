import { describe, expect, it } from 'vitest';
import { mapOf } from './bundle-map';

const at = (label: string, entryApMm: number | null, entryMlMm: number | null) => ({
	label,
	entryApMm,
	entryMlMm
});

describe('map of bundles', () => {
	it('is not drawn without coordinates', () => {
		expect(mapOf([at('T01', null, null), at('T02', -3.8, null)])).toBeNull();
	});

	it('has anterior up and right to the right', () => {
		const map = mapOf([at('front', -3, 2), at('back', -4, 2), at('right', -4, 3)]);
		const of = (label: string) => map?.points.find((point) => point.label === label);
		expect(of('front')?.y).toBeLessThan(of('back')?.y ?? 0);
		expect(of('right')?.x).toBeGreaterThan(of('back')?.x ?? 0);
	});

	it('keeps one scale for both axes and for its bar', () => {
		const map = mapOf([at('a', -3, 2), at('b', -4, 2), at('c', -4, 3.5)]);
		const [a, b, c] = map?.points ?? [];
		const pxPerMm = b.y - a.y;
		expect(c.x - b.x).toBeCloseTo(1.5 * pxPerMm, 9);
		expect(map?.barPx).toBeCloseTo((map?.barMm ?? 0) * pxPerMm, 9);
	});

	it('draws a single bundle without dividing by nothing', () => {
		const map = mapOf([at('T01', -3.8, 2.5)]);
		expect(Number.isFinite(map?.points[0].x)).toBe(true);
		expect(map?.heightPx).toBeGreaterThan(0);
	});
});
