import type { RateModel } from './rate-model';

/**
 * What the spikes and the silence of each unit argue for at one moment: n ln f(x) − τ f(x) at a
 * place, relative to its mean over all places that can be answered, in bits. Positive speaks for
 * the place. Over all units the bits sum to those of the joint evidence, as units are independent.
 * @param spikes  number of spikes of every unit in the window
 * @param windowS τ
 * @param place   position in `model.bin` (of the decoded bin, or of the true one)
 * @returns bits, one per unit; NaN everywhere when place is −1, a place that cannot be answered
 * @throws RangeError not one number of spikes per unit
 * Cost: O(units · places).
 */
export function unitEvidence(
	model: RateModel,
	spikes: ArrayLike<number>,
	windowS: number,
	place: number
): Float64Array {
	if (spikes.length !== model.units) {
		throw new RangeError(`spikes of ${spikes.length} units for a model of ${model.units}`);
	}
	const places = model.bin.length;
	return Float64Array.from(spikes, (n, u) => {
		if (place < 0) return NaN;
		const at = (p: number) =>
			n * model.logRates[u * places + p] - windowS * model.ratesHz[u * places + p];
		let sum = 0;
		for (let p = 0; p < places; p++) sum += at(p);
		return (at(place) - sum / places) * Math.LOG2E;
	});
}
