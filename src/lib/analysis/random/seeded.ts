import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { skipN } from 'pure-rand/utils/skipN';

/** A source of chance that a caller hands in; the same seed always gives the same numbers. */
export interface Random {
	/** Uniform in [0, 1). */
	next(): number;
	/** Uniform whole number in [0, below). */
	below(limit: number): number;
}

/**
 * Seeded generator (xoroshiro128+).
 * @param seed    whole number stored with the result
 * @param purpose keeps procedures apart, so that one drawing more numbers does not change another
 */
export function seeded(seed: number, purpose = ''): Random {
	let mixed = seed | 0;
	for (let i = 0; i < purpose.length; i++) {
		mixed = (Math.imul(mixed, 31) + purpose.charCodeAt(i)) | 0;
	}
	const generator = xoroshiro128plus(scrambled(mixed));
	// The generator writes its seed into a state that is otherwise nearly all zeros or ones; the first
	// numbers of neighbouring seeds would be alike.
	skipN(generator, 64);
	return {
		next: () => uniformFloat64(generator),
		below: (limit) => uniformInt(generator, 0, limit - 1)
	};
}

/** The 32-bit finaliser of MurmurHash3: one-to-one, and every bit of the input moves half of the bits. */
function scrambled(seed: number): number {
	let bits = seed;
	bits = Math.imul(bits ^ (bits >>> 16), 0x85ebca6b);
	bits = Math.imul(bits ^ (bits >>> 13), 0xc2b2ae35);
	return (bits ^ (bits >>> 16)) | 0;
}
