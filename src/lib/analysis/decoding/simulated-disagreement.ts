import { drawPoisson } from '../random/poisson-draw';
import type { Random } from '../random/seeded';
import { firstAbove } from '../statistics/first-above';
import { mean } from '../statistics/mean';
import type { DisagreementScale } from './disagreement';
import type { RateModel } from './rate-model';

/** Disagreement of windows that the model itself made at one place. */
export interface SimulatedDisagreement {
	/** Nats, ascending. */
	readonly dropNats: Float64Array;
	readonly meanNats: number;
	/** Standard deviation (n − 1). */
	readonly sdNats: number;
}

/**
 * Draws windows of independent Poisson units with the rates of one place, decodes each anew and
 * keeps how far its units disagree. All spikes are drawn at once and dealt out by the units' shares,
 * which is the same as drawing every unit and does not cost the silent ones.
 * @param place at which the animal stands
 * @param draws at least 2
 * @throws RangeError fewer than 2 draws
 * Cost: O(draws · spiking units · places).
 */
export function simulatedDisagreement(
	model: RateModel,
	scale: DisagreementScale,
	windowS: number,
	place: number,
	draws: number,
	random: Random
): SimulatedDisagreement {
	if (!(draws >= 2)) throw new RangeError(`${draws} draws tell nothing`);
	const places = model.bin.length;
	const upTo = new Float64Array(model.units);
	let totalHz = 0;
	for (let u = 0; u < model.units; u++) upTo[u] = totalHz += model.ratesHz[u * places + place];
	const unit = new Int32Array(model.units);
	const spikes = new Float64Array(model.units);
	const counts = new Int32Array(model.units);
	const dropNats = Float64Array.from({ length: draws }, () => {
		for (let left = drawPoisson(windowS * totalHz, random); left > 0; left--) {
			// Rounding may put the last draw past the end.
			counts[Math.min(model.units - 1, firstAbove(upTo, random.next() * totalHz))]++;
		}
		let fired = 0;
		for (let u = 0; u < model.units; u++) {
			if (counts[u] === 0) continue;
			unit[fired] = u;
			spikes[fired++] = counts[u];
			counts[u] = 0;
		}
		return scale.of(unit, spikes, 0, fired).dropNats;
	}).sort();
	const meanNats = mean(dropNats);
	const squares = dropNats.reduce((sum, drop) => sum + (drop - meanNats) ** 2, 0);
	return { dropNats, meanNats, sdNats: Math.sqrt(squares / (draws - 1)) };
}
