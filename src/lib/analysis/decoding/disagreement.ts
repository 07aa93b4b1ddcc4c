import { addSpikeEvidence } from './log-likelihood';
import type { RateModel } from './rate-model';

/** How far the units of one window are from agreeing on a place. */
export interface Disagreement {
	/** Σ_u maxₓ ℓ_u(x) − maxₓ Σ_u ℓ_u(x), nats; 0 when one place suits every unit best. */
	readonly dropNats: number;
	/** Place that suits all units together best (even prior), the lowest in a tie. */
	readonly place: number;
}

/** Measures windows with one model; keeps what the windows share. */
export interface DisagreementScale {
	/** @param unit,spikes sparse counts, entries from … to − 1; units that did not fire are left out */
	readonly of: (unit: Int32Array, spikes: Float64Array, from: number, to: number) => Disagreement;
	/** ℓ at the best place of one unit by itself. */
	readonly ownBest: (unit: number, spikes: number) => number;
}

/**
 * The disagreement of units (ours): with ℓ_u(x) = n ln f_u(x) − τ f_u(x), what all units together
 * lose because they must share one place, against each having the place that suits it best. A unit
 * that fires more than anywhere loses nothing by it; units that each fit, but at different places,
 * do: a mixed unit, a tracking error that moved the maps, or another place represented.
 * @param windowS τ
 * Cost: O(units · places) once; O(spiking units · places) per window.
 */
export function disagreementScale(model: RateModel, windowS: number): DisagreementScale {
	const places = model.bin.length;
	const known: Float64Array[] = Array.from({ length: model.units }, () => new Float64Array(0));
	const ownBest = (unit: number, n: number): number => {
		if (known[unit].length <= n) {
			const more = new Float64Array(Math.max(8, 2 * n)).fill(NaN);
			more.set(known[unit]);
			known[unit] = more;
		}
		if (Number.isNaN(known[unit][n])) known[unit][n] = bestOf(model, unit, n, windowS);
		return known[unit][n];
	};
	let silentBest = 0;
	for (let u = 0; u < model.units; u++) silentBest += ownBest(u, 0);
	const joint = new Float64Array(places);
	return {
		ownBest,
		of: (unit, spikes, from, to) => {
			for (let p = 0; p < places; p++) joint[p] = -windowS * model.totalHz[p];
			addSpikeEvidence(joint, model, unit, spikes, from, to);
			let place = 0;
			for (let p = 1; p < places; p++) if (joint[p] > joint[place]) place = p;
			let apart = silentBest;
			for (let e = from; e < to; e++) apart += ownBest(unit[e], spikes[e]) - ownBest(unit[e], 0);
			// Rounding may leave a hair below zero where all agree.
			return { dropNats: Math.max(0, apart - joint[place]), place };
		}
	};
}

function bestOf(model: RateModel, unit: number, n: number, windowS: number): number {
	const places = model.bin.length;
	let best = -Infinity;
	for (let p = unit * places; p < (unit + 1) * places; p++) {
		best = Math.max(best, n * model.logRates[p] - windowS * model.ratesHz[p]);
	}
	return best;
}
