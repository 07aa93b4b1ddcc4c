import type { RateModel } from './rate-model';
import { normalise } from './normalise';

/** Two units that cannot both be right, if each were asked alone. */
export interface OpposedUnits {
	readonly unitA: number;
	readonly unitB: number;
	/** Shared mass of their posteriors, Σ min(p, q): 1 the same, 0 nothing in common. */
	readonly overlap: number;
	/** Bin that each of them would answer. */
	readonly binA: number;
	readonly binB: number;
}

/**
 * Of the units that fired in a window, the two whose single-unit posteriors (even prior) have least
 * in common: where to look first when a window contradicts itself. Silent units say little alone
 * and are left out.
 * @param spikes number of spikes of every unit in the window
 * @returns null when fewer than two units fired; in a tie the lowest units
 * @throws RangeError not one number of spikes per unit
 * Cost: O(spiking units² · places).
 */
export function opposedUnits(
	model: RateModel,
	spikes: ArrayLike<number>,
	windowS: number
): OpposedUnits | null {
	if (spikes.length !== model.units) {
		throw new RangeError(`spikes of ${spikes.length} units for a model of ${model.units}`);
	}
	const places = model.bin.length;
	const alone: { unit: number; posterior: Float64Array; best: number }[] = [];
	for (let u = 0; u < model.units; u++) {
		if (spikes[u] === 0) continue;
		const posterior = new Float64Array(places);
		for (let p = 0; p < places; p++) {
			const at = u * places + p;
			posterior[p] = spikes[u] * model.logRates[at] - windowS * model.ratesHz[at];
		}
		const { best } = normalise(posterior.slice(), posterior);
		alone.push({ unit: u, posterior, best });
	}
	let least: OpposedUnits | null = null;
	for (let i = 0; i < alone.length; i++) {
		for (let j = i + 1; j < alone.length; j++) {
			const [a, b] = [alone[i], alone[j]];
			let overlap = 0;
			for (let p = 0; p < places; p++) overlap += Math.min(a.posterior[p], b.posterior[p]);
			if (least && overlap >= least.overlap) continue;
			least = {
				unitA: a.unit,
				unitB: b.unit,
				overlap,
				binA: model.bin[a.best],
				binB: model.bin[b.best]
			};
		}
	}
	return least;
}
