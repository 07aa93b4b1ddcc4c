/** Day-to-day course of a bundle's ln median peak amplitude about its own level. */
export interface AmplitudeModel {
	/** Autocorrelation from one day to the next, φ in [0, 1). */
	readonly phi: number;
	/** Standard deviation of a day's innovation, ln units. */
	readonly sd: number;
	/** Fall of the level to look for, ln units, < 0. */
	readonly delta: number;
}

/** 10 % from day to day, a fall by 22 %. Assumed; to be re-estimated on the lab's own days. */
export const AMPLITUDE: AmplitudeModel = { phi: 0.6, sd: 0.1, delta: -0.25 };

/** Where a bundle's amplitude usually stands. */
export interface AmplitudeLevel {
	/** ln units. */
	readonly mean: number;
	/** Of the mean, while it is still being learnt; 0 when known. */
	readonly variance: number;
}

/**
 * Evidence of one step that the amplitude of a bundle's kept units has fallen. With y the ln
 * amplitude less its level, e = y today − φ·y before and d = (1 − φ)δ, it is the log likelihood
 * ratio (d·e − d²/2)/σ² of a first-order autoregression. Over a gap of g days φᵍ stands for φ and
 * σ² is what g innovations add up to. A level known only roughly adds (1 − φ)² its variance to σ².
 * @param before  ln amplitude on the earlier day
 * @param today   the same on the later day; NaN on either side (no units) gives 0
 * @param gapDays days between, ≥ 1
 */
export function amplitudeEvidence(
	before: number,
	today: number,
	gapDays: number,
	level: AmplitudeLevel,
	model: AmplitudeModel = AMPLITUDE
): number {
	if (!Number.isFinite(before) || !Number.isFinite(today)) return 0;
	const { memory, variance } = amplitudeStep(model, gapDays);
	const expected = (1 - memory) * model.delta;
	const surprise = today - level.mean - memory * (before - level.mean);
	const spread = variance + (1 - memory) ** 2 * level.variance;
	return (expected * surprise - (expected * expected) / 2) / spread;
}

/** What g days make of the autoregression: what is left of a deviation, and the variance added. */
export function amplitudeStep(
	{ phi, sd }: AmplitudeModel,
	gapDays: number
): { readonly memory: number; readonly variance: number } {
	const memory = phi ** gapDays;
	return { memory, variance: (sd * sd * (1 - memory * memory)) / (1 - phi * phi) };
}
