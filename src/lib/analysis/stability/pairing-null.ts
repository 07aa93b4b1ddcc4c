import type { Random } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { fisherZ } from '../statistics/fisher-z';
import { mapCorrelation } from './map-correlation';
import { rowAt, type MatchedMaps } from './matched-maps';

/** Which units may take each other's place. */
export type PairingScope = 'within-bundle' | 'across-bundles';

/**
 * Random pairings of the units of one day with those of another.
 * Within bundles they keep what units of one wire share; that asks more of the match than pairings across.
 * @param bundle of each unit
 * @returns for each draw the later unit that each earlier one is paired with
 */
export function drawPairings(
	bundle: Int32Array,
	scope: PairingScope,
	draws: number,
	random: Random
): Int32Array[] {
	const all = [...bundle.keys()];
	const groups =
		scope === 'across-bundles'
			? [all]
			: [...new Set(bundle)].map((one) => all.filter((u) => bundle[u] === one));
	return Array.from({ length: draws }, () => {
		const pairing = new Int32Array(bundle.length);
		for (const group of groups) {
			const order = shuffled(group.length, random);
			group.forEach((unit, k) => (pairing[unit] = group[order[k]]));
		}
		return pairing;
	});
}

/** Mean similarity of maps against what wrong pairings give. */
export interface PairingNull {
	/** Mean Fisher z of the matched pairs. */
	readonly meanZ: number;
	readonly nullMeanZ: Float64Array;
	/** (b + 1)/(m + 1), b = pairings with at least the observed mean; NaN when nothing can be said. */
	readonly p: number;
}

/** Means that differ by rounding alone count as equal. */
const ROUNDING = 1e-12;

/**
 * Tests whether matched units keep their maps: the mean Fisher z of matched pairs against the same mean
 * under other pairings. p follows Phipson and Smyth 2010, never 0. Pairs without a correlation are
 * left out of each mean.
 * @param pairings see `drawPairings`; at least 1000 for a figure to report
 * @returns p is NaN without pairings, without a defined pair, or when no pairing moves any unit
 * Cost: O(units² · bins + pairings · units).
 */
export function pairingNull(
	{ earlierHz, laterHz, units, bins }: MatchedMaps,
	pairings: readonly Int32Array[]
): PairingNull {
	const z = new Float64Array(units * units);
	for (let a = 0; a < units; a++) {
		for (let b = 0; b < units; b++) {
			const { r } = mapCorrelation(rowAt(earlierHz, bins, a), rowAt(laterHz, bins, b));
			z[a * units + b] = fisherZ(r);
		}
	}
	const meanOf = (partner: (a: number) => number) => {
		let sum = 0;
		let count = 0;
		for (let a = 0; a < units; a++) {
			const one = z[a * units + partner(a)];
			if (Number.isNaN(one)) continue;
			sum += one;
			count++;
		}
		return sum / count;
	};
	const meanZ = meanOf((a) => a);
	const nullMeanZ = Float64Array.from(pairings, (pairing) => meanOf((a) => pairing[a]));
	const atLeast = nullMeanZ.filter((value) => value >= meanZ - ROUNDING).length;
	const isTested =
		!Number.isNaN(meanZ) && pairings.some((pairing) => pairing.some((b, a) => a !== b));
	return { meanZ, nullMeanZ, p: isTested ? (atLeast + 1) / (pairings.length + 1) : NaN };
}
