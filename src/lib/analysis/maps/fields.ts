import type { Bins } from '../arena/bins';
import { mod } from '../arena/ring';
import { peakBin } from './peak';

/** What makes a place field. */
export interface FieldRule {
	/** Share of the map's peak a bin must reach. */
	readonly threshold: number;
	readonly minBins: number;
	readonly minPeakHz: number;
}

/** The rule of the session defaults: a fifth of the peak, at least 1 Hz, 8 cm or nine bins. */
export function fieldRule(bins: Bins): FieldRule {
	const minBins = bins.dimensions === 1 ? Math.ceil(8 / bins.binCm - 1e-9) : 9;
	return { threshold: 0.2, minBins, minPeakHz: 1 };
}

export interface Field {
	/** Bins of the field, ascending. */
	readonly bins: readonly number[];
	readonly peakBin: number;
	readonly peakRateHz: number;
	/** Plain mean of the rates in the field. */
	readonly meanRateHz: number;
	/** Rate-weighted centre; on a ring laid out without the seam. */
	readonly centreXCm: number;
	/** NaN in one dimension. */
	readonly centreYCm: number;
	/** A field that fills a whole ring has the circular mean for its centre. */
	readonly isWholeRing: boolean;
}

/**
 * Place fields of a map: touching bins at or above threshold · peak, large and strong enough.
 * A NaN bin breaks contact. Strongest field first, ties by lower bin.
 * @param neighbours touching bins, without diagonals
 * @returns empty when the peak of the map is under the least peak
 */
export function placeFields(
	ratesHz: Float64Array,
	bins: Bins,
	neighbours: readonly Int32Array[],
	rule: FieldRule
): Field[] {
	const top = peakBin(ratesHz);
	if (top < 0 || ratesHz[top] < rule.minPeakHz) return [];
	const least = rule.threshold * ratesHz[top];
	const isTaken = new Uint8Array(ratesHz.length);
	const found: Field[] = [];
	for (let seed = 0; seed < ratesHz.length; seed++) {
		if (isTaken[seed] || !(ratesHz[seed] >= least)) continue;
		const members = [seed];
		isTaken[seed] = 1;
		for (let k = 0; k < members.length; k++) {
			for (const near of neighbours[members[k]]) {
				if (isTaken[near] || !(ratesHz[near] >= least)) continue;
				isTaken[near] = 1;
				members.push(near);
			}
		}
		if (members.length < rule.minBins) continue;
		const field = describe(
			ratesHz,
			bins,
			members.sort((a, b) => a - b)
		);
		if (field.peakRateHz >= rule.minPeakHz) found.push(field);
	}
	return found.sort((a, b) => b.peakRateHz - a.peakRateHz || a.peakBin - b.peakBin);
}

function describe(ratesHz: Float64Array, bins: Bins, members: readonly number[]): Field {
	const lengthCm = bins.binsX * bins.binCm;
	const isWholeRing = bins.isRing && members.length === bins.count;
	let peak = members[0];
	let sum = 0;
	for (const k of members) {
		sum += ratesHz[k];
		if (ratesHz[k] > ratesHz[peak]) peak = k;
	}
	const shift = bins.isRing && !isWholeRing ? seamOf(members, bins.count) : 0;
	let x = 0;
	let y = 0;
	let cosine = 0;
	let sine = 0;
	for (const k of members) {
		const laidOut = k < shift ? bins.centreXCm[k] + lengthCm : bins.centreXCm[k];
		x += (ratesHz[k] * laidOut) / sum;
		y += (ratesHz[k] * bins.centreYCm[k]) / sum;
		const angle = (2 * Math.PI * bins.centreXCm[k]) / lengthCm;
		cosine += ratesHz[k] * Math.cos(angle);
		sine += ratesHz[k] * Math.sin(angle);
	}
	const circular = mod((Math.atan2(sine, cosine) * lengthCm) / (2 * Math.PI), lengthCm);
	return {
		bins: members,
		peakBin: peak,
		peakRateHz: ratesHz[peak],
		meanRateHz: sum / members.length,
		centreXCm: isWholeRing ? circular : bins.isRing ? mod(x, lengthCm) : x,
		centreYCm: y,
		isWholeRing
	};
}

/** First bin after the hole of a field that runs over the seam of a ring; 0 when it does not. */
function seamOf(members: readonly number[], count: number): number {
	if (members[0] !== 0 || members.at(-1) !== count - 1) return 0;
	const hole = members.findIndex((bin, i) => i > 0 && bin > members[i - 1] + 1);
	return hole < 0 ? 0 : members[hole];
}
