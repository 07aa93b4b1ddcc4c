import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

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
	const generator = xoroshiro128plus(mixed);
	return {
		next: () => uniformFloat64(generator),
		below: (limit) => uniformInt(generator, 0, limit - 1)
	};
}
