import { drawBinomial } from '../random/binomial-draw';
import { drawNormal } from '../random/normal-draw';
import { drawPoisson } from '../random/poisson-draw';
import type { Random } from '../random/seeded';
import { AMPLITUDE, type AmplitudeModel } from './amplitude-evidence';
import { stationaryMean, type YieldModel } from './yield-model';

/** A bundle made up from the model, a day at a time. */
export interface SimulatedBundle {
	/** Units yesterday and today, kept and new among today's. */
	previous: number;
	units: number;
	kept: number;
	fresh: number;
	/** ln amplitude today and yesterday, relative to a level of 0. */
	lnAmplitude: number;
	previousLnAmplitude: number;
}

/** A bundle on a day of its long run. */
export function simulatedBundle(
	model: YieldModel,
	random: Random,
	{ phi, sd }: AmplitudeModel = AMPLITUDE
): SimulatedBundle {
	const units = drawPoisson(stationaryMean(model), random);
	const lnAmplitude = (drawNormal(random) * sd) / Math.sqrt(1 - phi * phi);
	return {
		previous: units,
		units,
		kept: units,
		fresh: 0,
		lnAmplitude,
		previousLnAmplitude: lnAmplitude
	};
}

/**
 * Takes the bundle a day on, in place.
 * @param level of ln amplitude in force that day: 0, or the fall
 */
export function simulateDay(
	bundle: SimulatedBundle,
	{ survival, arrivals }: YieldModel,
	level: number,
	random: Random,
	{ phi, sd }: AmplitudeModel = AMPLITUDE
): void {
	bundle.previous = bundle.units;
	bundle.kept = drawBinomial(bundle.units, survival, random);
	bundle.fresh = drawPoisson(arrivals, random);
	bundle.units = bundle.kept + bundle.fresh;
	bundle.previousLnAmplitude = bundle.lnAmplitude;
	bundle.lnAmplitude = level + phi * (bundle.lnAmplitude - level) + drawNormal(random) * sd;
}
