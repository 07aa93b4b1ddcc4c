import { AMPLITUDE, amplitudeEvidence, type AmplitudeModel } from './amplitude-evidence';
import { learnLevel, learnYield, levelOf, PRIOR, yieldOf, type Baseline } from './bundle-baseline';
import { fallenModel, fallEvidence, FALLS, type Fall } from './fall-evidence';

/** One recorded day of a bundle. */
export interface YieldDay {
	/** Whole day number. */
	readonly day: number;
	/** Units active in any epoch of the day. */
	readonly units: number;
	/** Units matched to the recorded day before; null when nobody matched them. */
	readonly kept: number | null;
	/** ln median peak amplitude of the kept units; NaN without units or without amplitudes. */
	readonly lnAmplitude: number;
}

export interface FallSettings {
	readonly prior: Baseline;
	/** Falls looked for; the chart shows the best supported one. */
	readonly falls: readonly Fall[];
	readonly amplitude: AmplitudeModel;
	/** Recorded days before the first evidence; until then the prior weighs too much. */
	readonly quietDays: number;
	/** Recorded days that the baseline is learnt from, ≥ 8. */
	readonly learnDays: number;
}

export const FALL_SETTINGS: FallSettings = {
	prior: PRIOR,
	falls: FALLS,
	amplitude: AMPLITUDE,
	quietDays: 5,
	learnDays: 16
};

/** Where the chart of a bundle stands after a day. */
export interface FallState {
	readonly baseline: Baseline;
	/** Recorded days since the start. */
	readonly recorded: number;
	/** One sum for each fall looked for, ≥ 0. */
	readonly sums: readonly number[];
	readonly last: YieldDay | null;
}

/** A chart that has seen nothing, as after a move that settled. */
export function startFall(settings: FallSettings = FALL_SETTINGS): FallState {
	return {
		baseline: settings.prior,
		recorded: 0,
		sums: settings.falls.map(() => 0),
		last: null
	};
}

/** S: the best supported fall, in natural-log units. */
export function fallStatistic({ sums }: FallState): number {
	return Math.max(0, ...sums);
}

/**
 * Likelihood-ratio CUSUM of a bundle (Page 1954), one day on: S = max(0, S + evidence) for each fall
 * looked for. A day is judged by what earlier days taught, then teaches itself, up to `learnDays`.
 * Days not recorded are gaps: no update, and the next step spans them.
 * @throws RangeError a day not after the one before it
 */
export function nextFall(
	state: FallState,
	today: YieldDay,
	settings: FallSettings = FALL_SETTINGS
): FallState {
	const { last } = state;
	const recorded = state.recorded + 1;
	const isLearning = recorded <= settings.learnDays;
	if (last === null) {
		const baseline = learnLevel(state.baseline, NaN, today.lnAmplitude, 1, settings.amplitude);
		return { ...state, baseline, recorded, last: today };
	}
	const gapDays = today.day - last.day;
	if (!(gapDays >= 1)) throw new RangeError(`day ${today.day} does not follow day ${last.day}`);
	const step = { previous: last.units, today: today.units, kept: today.kept, gapDays };
	const { baseline } = state;
	let { sums } = state;
	if (recorded > settings.quietDays) {
		const usual = yieldOf(baseline);
		const amplitude = amplitudeEvidence(
			last.lnAmplitude,
			today.lnAmplitude,
			gapDays,
			levelOf(baseline),
			settings.amplitude
		);
		sums = settings.falls.map((fall, i) =>
			Math.max(0, state.sums[i] + amplitude + fallEvidence(step, usual, fallenModel(usual, fall)))
		);
	}
	if (!isLearning) return { baseline, recorded, sums, last: today };
	const taught = learnLevel(
		learnYield(baseline, step),
		last.lnAmplitude,
		today.lnAmplitude,
		gapDays,
		settings.amplitude
	);
	return { baseline: taught, recorded, sums, last: today };
}

/**
 * Moves the chart's last day on without evidence and without learning: a day whose counts fell for
 * a cause common to the bundles, after which the next day is compared with it.
 */
export function passFall(state: FallState, today: YieldDay): FallState {
	return { ...state, last: today };
}
