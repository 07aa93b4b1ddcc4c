import type { Random } from '../random/seeded';
import { firstAbove } from '../statistics/first-above';
import { disagreementScale } from './disagreement';
import type { RateModel } from './rate-model';
import { simulatedDisagreement, type SimulatedDisagreement } from './simulated-disagreement';
import type { WindowCounts } from './window-counts';

/** A window and how well its units agree. */
export interface Contradiction {
	readonly window: number;
	/** Bin that suits all units together best. */
	readonly bin: number;
	/** What sharing that place costs the units, nats. */
	readonly dropNats: number;
	/** The same less its mean, over its standard deviation, both as the model gives them there. */
	readonly z: number;
	/** Share of windows of the model, at that place, whose units disagree at least as much; never 0. */
	readonly p: number;
}

/** Draws behind a p: it can be as small as 1/2000. */
const DRAWS = 1999;
/** Drops that differ by rounding alone count as equal. */
const ROUNDING = 1e-9;

/**
 * How well the units of each window agree, against windows that independent Poisson units with the
 * same maps would give at the place found (ours; parametric bootstrap, p as in Phipson and Smyth
 * 2010). A small p says: these counts do not belong to one place. Of many windows some have a small
 * p by chance, level × windows; order by z and show that number beside the list. Spikes that come in
 * bursts vary more than Poisson ones and make small p commoner: judge a window among all the others.
 * @param windows windows of the model's fold, in any order
 * @param draws   per place found
 * @returns one for each window, in the order given
 * Cost: O(draws · spiking units · places) per place found, and O(spiking units · places) per window.
 */
export function contradictions(
	model: RateModel,
	counts: WindowCounts,
	windowS: number,
	windows: Int32Array,
	random: Random,
	draws = DRAWS
): Contradiction[] {
	const scale = disagreementScale(model, windowS);
	const found = Array.from(windows, (w) =>
		scale.of(counts.unit, counts.spikes, counts.first[w], counts.first[w + 1])
	);
	const nullAt = new Map<number, SimulatedDisagreement>();
	// Places in ascending order, so that the order of the windows cannot change a p.
	for (const place of [...new Set(found.map((one) => one.place))].sort((a, b) => a - b)) {
		nullAt.set(place, simulatedDisagreement(model, scale, windowS, place, draws, random));
	}
	return found.flatMap(({ dropNats, place }, k) => {
		const simulated = nullAt.get(place);
		if (!simulated) return [];
		const below = firstAbove(simulated.dropNats, dropNats - ROUNDING);
		return {
			window: windows[k],
			bin: model.bin[place],
			dropNats,
			z: (dropNats - simulated.meanNats) / simulated.sdNats,
			p: (draws - below + 1) / (draws + 1)
		};
	});
}
