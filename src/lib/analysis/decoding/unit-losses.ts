import type { DisagreementScale } from './disagreement';
import type { RateModel } from './rate-model';

/**
 * What each unit loses by having to share one place, nats: ℓ_u at its own best place less ℓ_u at the
 * shared one. The losses at the place that suits all best sum to the disagreement of the window;
 * the units with the largest are those that argue for elsewhere.
 * @param spikes number of spikes of every unit in the window
 * @param place  position in `model.bin`
 * @returns nats, ≥ 0, one per unit
 * @throws RangeError not one number of spikes per unit
 * Cost: O(units).
 */
export function unitLosses(
	model: RateModel,
	scale: DisagreementScale,
	spikes: ArrayLike<number>,
	windowS: number,
	place: number
): Float64Array {
	if (spikes.length !== model.units) {
		throw new RangeError(`spikes of ${spikes.length} units for a model of ${model.units}`);
	}
	const places = model.bin.length;
	return Float64Array.from(spikes, (n, u) => {
		const at = u * places + place;
		return scale.ownBest(u, n) - (n * model.logRates[at] - windowS * model.ratesHz[at]);
	});
}
