import type { BundleView } from '$lib/server/services/implant-views';

export interface BundleMap {
	widthPx: number;
	heightPx: number;
	points: { label: string; x: number; y: number }[];
	/** A scale bar of a round length. */
	barMm: number;
	barPx: number;
}

const WIDTH_PX = 320;
const EDGE_PX = 40;
const MOST_PX_PER_MM = 160;

/** Where bundles go in, seen from above: anterior up, right to the right, one scale for both axes. */
export function mapOf(
	bundles: Pick<BundleView, 'label' | 'entryApMm' | 'entryMlMm'>[]
): BundleMap | null {
	const placed = bundles.flatMap(({ label, entryApMm: apMm, entryMlMm: mlMm }) =>
		apMm === null || mlMm === null ? [] : [{ label, apMm, mlMm }]
	);
	if (placed.length === 0) return null;
	const ap = placed.map((point) => point.apMm);
	const ml = placed.map((point) => point.mlMm);
	const [left, right] = [Math.min(...ml), Math.max(...ml)];
	const [back, front] = [Math.min(...ap), Math.max(...ap)];
	const room = WIDTH_PX - 2 * EDGE_PX;
	const pxPerMm = Math.min(MOST_PX_PER_MM, room / Math.max(right - left, front - back, 0.001));
	const heightPx = (front - back) * pxPerMm + 2 * EDGE_PX;
	const startPx = EDGE_PX + (room - (right - left) * pxPerMm) / 2;
	const barMm = [5, 2, 1, 0.5, 0.2, 0.1].find((length) => length * pxPerMm <= 100) ?? 0.1;
	return {
		widthPx: WIDTH_PX,
		heightPx,
		points: placed.map(({ label, apMm, mlMm }) => ({
			label,
			x: startPx + (mlMm - left) * pxPerMm,
			y: EDGE_PX + (front - apMm) * pxPerMm
		})),
		barMm,
		barPx: barMm * pxPerMm
	};
}
