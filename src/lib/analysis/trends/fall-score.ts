import { AMPLITUDE, type AmplitudeModel } from './amplitude-evidence';
import type { SimulatedBundle } from './simulated-bundle';
import { nextCountLogPmf, type YieldModel } from './yield-model';

/** What a lab's counts let the chart see. */
export type EvidenceKind = 'totals' | 'kept-new' | 'kept-new-amplitude';

/** Evidence of one simulated day for each fallen model, added to `sums` in place; returns the largest. */
export type FallScore = (bundle: SimulatedBundle, sums: Float64Array) => number;

/**
 * The chart of `nextFall` for a known baseline and days without gaps, as fast as a simulation needs
 * it: coefficients and the totals' table are made once.
 */
export function fallScore(
	usual: YieldModel,
	fallen: readonly YieldModel[],
	kind: EvidenceKind,
	{ phi, sd, delta }: AmplitudeModel = AMPLITUDE
): FallScore {
	const ofCounts = fallen.map((after) =>
		kind === 'totals' ? totalsScore(usual, after) : keptNewScore(usual, after)
	);
	const expected = (1 - phi) * delta;
	return (bundle, sums) => {
		let amplitude = 0;
		if (kind === 'kept-new-amplitude' && bundle.units > 0 && bundle.previous > 0) {
			const surprise = bundle.lnAmplitude - phi * bundle.previousLnAmplitude;
			amplitude = (expected * surprise - (expected * expected) / 2) / (sd * sd);
		}
		let top = 0;
		for (let i = 0; i < sums.length; i++) {
			sums[i] = Math.max(0, sums[i] + amplitude + ofCounts[i](bundle));
			top = Math.max(top, sums[i]);
		}
		return top;
	};
}

function keptNewScore(usual: YieldModel, after: YieldModel) {
	const kept = Math.log(after.survival / usual.survival);
	const lost = Math.log((1 - after.survival) / (1 - usual.survival));
	const fresh = Math.log(after.arrivals / usual.arrivals);
	const silent = after.arrivals - usual.arrivals;
	return (bundle: SimulatedBundle) =>
		bundle.kept * kept + (bundle.previous - bundle.kept) * lost + bundle.fresh * fresh - silent;
}

function totalsScore(usual: YieldModel, after: YieldModel) {
	const known = new Map<number, number>();
	return ({ previous, units }: SimulatedBundle) => {
		// A bundle holds far fewer than 4096 units.
		const key = previous * 4096 + units;
		const found = known.get(key);
		if (found !== undefined) return found;
		const score = nextCountLogPmf(after, previous, units) - nextCountLogPmf(usual, previous, units);
		known.set(key, score);
		return score;
	};
}
