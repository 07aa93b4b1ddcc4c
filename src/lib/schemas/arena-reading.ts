import type { Arena } from '$lib/analysis/arena/arena';
import { binsOf, type Bins } from '$lib/analysis/arena/bins';
import { ArenaError, parseArena } from '$lib/analysis/arena/parse-arena';

/** What an arena's description says, in plain words, or why it says nothing. */
export interface ArenaReading {
	isReadable: boolean;
	words: string;
}

/** "straight track, 300 cm, 60 bins of 5 cm", or the reason in the parser's words. */
export function readArena(description: string, binCm: number | null): ArenaReading {
	try {
		const arena = parseArena(description);
		const shape = shapeInWords(arena);
		if (!binCm) return { isReadable: true, words: shape };
		return { isReadable: true, words: `${shape}, ${binsInWords(binsOf(arena, binCm))}` };
	} catch (fault) {
		if (fault instanceof ArenaError || fault instanceof RangeError) {
			return { isReadable: false, words: `${fault.message}.` };
		}
		throw fault;
	}
}

function shapeInWords(arena: Arena): string {
	switch (arena.kind) {
		case 'straight':
			return `straight track, ${cm(arena.lengthCm)}`;
		case 'ring':
			return `ring, ${cm(arena.lengthCm)} around`;
		case 'rectangle':
			return `rectangle, ${round(arena.widthCm)} × ${cm(arena.heightCm)}`;
		case 'disc':
			return `disc, ${cm(arena.diameterCm)} across`;
		case 'polyline':
			return `bent track of ${pieces(arena.points.length - 1)}, ${cm(arena.lengthCm)}`;
		case 'tree':
			return `branched track of ${pieces(arena.pieces.length)}, ${cm(arena.lengthCm)}`;
	}
}

function binsInWords(bins: Bins): string {
	const count = bins.dimensions === 2 ? `${bins.binsX} × ${bins.binsY}` : String(bins.count);
	return `${count} bins of ${cm(bins.binCm)}`;
}

const round = (lengthCm: number) => String(Math.round(lengthCm * 10) / 10);
const cm = (lengthCm: number) => `${round(lengthCm)} cm`;
const pieces = (count: number) => (count === 1 ? '1 piece' : `${count} pieces`);
