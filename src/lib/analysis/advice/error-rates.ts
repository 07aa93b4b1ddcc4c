import type { Random } from '../random/seeded';
import { yieldOf } from '../trends/bundle-baseline';
import { fallStatistic, nextFall, startFall } from '../trends/fall-chart';
import { fallenModel } from '../trends/fall-evidence';
import type { EvidenceKind } from '../trends/fall-score';
import { simulatedBundle, simulateDay } from '../trends/simulated-bundle';
import type { YieldModel } from '../trends/yield-model';
import type { AdviceParameters } from './parameters';
import type { ThresholdSource } from './thresholds';

export interface ErrorRateQuestion {
	/** A typical bundle of the lab. */
	readonly model: YieldModel;
	readonly kind: EvidenceKind;
	/** Bundles recorded in the lab at present. */
	readonly bundles: number;
	readonly recordedDaysAWeek: number;
	/** Chance a day that a bundle really collapses; the lab's own, or a guess that is shown as one. */
	readonly collapseADay: number;
}

/** Per lab-week, simulated. */
export interface ErrorRates {
	/** Advances advised for bundles that had not collapsed. */
	readonly falseAdvances: number;
	readonly rightAdvances: number;
	/** Advances expected to be right among all; NaN when none occurred. */
	readonly rightShare: number;
	/** Stable bundles whose statistic passed the watch limit anew. */
	readonly falseWatches: number;
	/** Median recorded days from a collapse to its advance, of those advised; NaN when none was. */
	readonly medianDelayDays: number;
	/** Bundle-days behind the figures. */
	readonly simulatedDays: number;
}

/** Recorded days of a simulated bundle. */
const DAYS = 60;

/**
 * How often advice of these limits errs, by simulation with baselines learnt as the advice learns
 * them. Every landmark is taken to say "above": a lab that listens has fewer false advances. After an
 * advance the bundle starts anew, settled and stable.
 * @param runs bundles simulated
 * @throws RangeError bundles, days or chance out of range
 * Cost: about 0.3 ms a simulated bundle, matched units; limits not asked for before come on top.
 */
export function errorRates(
	question: ErrorRateQuestion,
	parameters: AdviceParameters,
	thresholds: ThresholdSource,
	random: Random,
	runs = 400
): ErrorRates {
	const { bundles, recordedDaysAWeek, collapseADay } = question;
	if (!(bundles >= 0 && recordedDaysAWeek >= 0 && collapseADay >= 0 && collapseADay <= 1)) {
		throw new RangeError('bundles, days and the chance of a collapse must not be negative');
	}
	const seen: Seen = { falseAdvances: 0, falseWatches: 0, delays: [] };
	for (let run = 0; run < runs; run++)
		simulateBundle(question, parameters, thresholds, random, seen);
	const scale = (bundles * recordedDaysAWeek) / (runs * DAYS);
	const sorted = seen.delays.sort((a, b) => a - b);
	return {
		falseAdvances: seen.falseAdvances * scale,
		rightAdvances: sorted.length * scale,
		rightShare: sorted.length / (sorted.length + seen.falseAdvances),
		falseWatches: seen.falseWatches * scale,
		medianDelayDays: sorted.length > 0 ? sorted[Math.floor((sorted.length - 1) / 2)] : NaN,
		simulatedDays: runs * DAYS
	};
}

interface Seen {
	falseAdvances: number;
	falseWatches: number;
	readonly delays: number[];
}

function simulateBundle(
	{ model, kind, collapseADay }: ErrorRateQuestion,
	parameters: AdviceParameters,
	thresholds: ThresholdSource,
	random: Random,
	seen: Seen
): void {
	const settings = parameters.fall;
	const collapsed = fallenModel(model, settings.falls[0]);
	// Limits differ between models by far less than a factor of two; asking for each is what costs.
	const surelyBelow = thresholds(model, kind).watchAt / 2;
	let bundle = simulatedBundle(model, random, settings.amplitude);
	let state = startFall(settings);
	let collapsedOn = NaN;
	let wasWatched = false;
	for (let day = 0; day < DAYS; day++) {
		if (Number.isNaN(collapsedOn) && random.next() < collapseADay) collapsedOn = day;
		const isCollapsed = day >= collapsedOn;
		const level = isCollapsed ? settings.amplitude.delta : 0;
		simulateDay(bundle, isCollapsed ? collapsed : model, level, random, settings.amplitude);
		const isAmplitude = kind === 'kept-new-amplitude' && bundle.units > 0;
		state = nextFall(
			state,
			{
				day,
				units: bundle.units,
				kept: kind === 'totals' ? null : bundle.kept,
				lnAmplitude: isAmplitude ? bundle.lnAmplitude : NaN
			},
			settings
		);
		const s = fallStatistic(state);
		if (s < surelyBelow) {
			wasWatched = false;
			continue;
		}
		const { watchAt, advanceAt } = thresholds(yieldOf(state.baseline), kind);
		const isWatched = s >= watchAt;
		if (isWatched && !wasWatched && !isCollapsed) seen.falseWatches++;
		wasWatched = isWatched;
		if (s < advanceAt || bundle.units > 1 || state.recorded < parameters.advanceTallies) continue;
		if (isCollapsed) seen.delays.push(day - collapsedOn + 1);
		else seen.falseAdvances++;
		bundle = simulatedBundle(model, random, settings.amplitude);
		state = startFall(settings);
		collapsedOn = NaN;
		wasWatched = false;
	}
}
