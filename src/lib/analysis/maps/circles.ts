import type { Arena } from '../arena/arena';
import type { Bins } from '../arena/bins';
import { metricOf } from '../arena/metric';

/** A rounding error of a distance of whole bins. */
const SLACK = 1e-9;

/**
 * Circles of bins about a bin: bins whose centres lie more than radius − 1 and at most radius bins
 * away. On a line a circle is a stretch, on a ring it goes over the seam, on a tree it follows the
 * way along the maze.
 */
export interface Circles {
	/** The radius, in bins, that holds the whole arena from any bin. */
	readonly largest: number;
	/** Calls `visit` with each bin of the circle of this radius about a bin; 0 is the bin itself. */
	readonly each: (bin: number, radius: number, visit: (bin: number) => void) => void;
}

/** @returns circles of every radius; O(bins²) memory on a tree only */
export function circlesOf(arena: Arena, bins: Bins): Circles {
	return arena.kind === 'tree' ? treeCircles(arena, bins) : gridCircles(bins);
}

function gridCircles({ binsX, binsY, isRing }: Bins): Circles {
	const farX = isRing ? Math.floor(binsX / 2) : binsX - 1;
	const largest = Math.ceil(Math.hypot(farX, binsY - 1) - SLACK);
	const offsets = Array.from({ length: largest + 1 }, (): [number, number][] => []);
	// On a ring of an even number of bins the one opposite is reached both ways: take it once.
	const nearX = isRing && binsX % 2 === 0 ? 1 - farX : -farX;
	for (let dy = 1 - binsY; dy < binsY; dy++) {
		for (let dx = nearX; dx <= farX; dx++) {
			offsets[Math.ceil(Math.hypot(dx, dy) - SLACK)].push([dx, dy]);
		}
	}
	return {
		largest,
		each: (bin, radius, visit) => {
			const column = bin % binsX;
			const row = Math.floor(bin / binsX);
			for (const [dx, dy] of offsets[radius]) {
				const x = isRing ? (column + dx + binsX) % binsX : column + dx;
				const y = row + dy;
				if (x >= 0 && x < binsX && y >= 0 && y < binsY) visit(y * binsX + x);
			}
		}
	};
}

function treeCircles(arena: Extract<Arena, { kind: 'tree' }>, bins: Bins): Circles {
	const metric = metricOf(arena);
	const about = Array.from(bins.centreXCm, (from) => {
		const circles: number[][] = [];
		bins.centreXCm.forEach((to, j) => {
			const radius = Math.ceil(metric(from, NaN, to, NaN) / bins.binCm - SLACK);
			(circles[radius] ??= []).push(j);
		});
		return circles;
	});
	return {
		largest: Math.max(...about.map((circles) => circles.length)) - 1,
		each: (bin, radius, visit) => about[bin][radius]?.forEach(visit)
	};
}
