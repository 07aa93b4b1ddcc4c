import { FALL_SETTINGS, type FallSettings } from '../trends/fall-chart';

/** What a lab may set; stored with every advice. */
export interface AdviceParameters {
	/** Mean recorded days of a stable bundle between false alarms, for each limit. */
	readonly watchRunDays: number;
	readonly advanceRunDays: number;
	readonly fall: FallSettings;
	/** Seed of the simulated limits. */
	readonly seed: number;

	/** Below it a bundle's worth no longer counts, bits a window. */
	readonly leastWorthBits: number;
	/** Days over whose arenas the worth is the best. */
	readonly worthDays: number;

	/** Hours of rest after a move, and after a small one. */
	readonly settlingH: number;
	readonly smallSettlingH: number;
	readonly smallMoveUm: number;

	/** Recorded days before any advice on yield, and before an advance. */
	readonly leastTallies: number;
	readonly advanceTallies: number;
	/** At least so many of them within so many days. */
	readonly latelyTallies: number;
	readonly latelyDays: number;

	/** Common cause: bundles able to show a fall, and the share that did. */
	readonly commonAble: number;
	readonly commonShare: number;
	/** A fall shows when it passes so many conditional standard deviations. */
	readonly fallSds: number;
	/** A bundle is able to show one when silence is rarer than this under its own model. */
	readonly ableP: number;

	readonly landmarkDays: number;
	readonly criticalH: number;
	/** Travel never advised away, µm. */
	readonly reserveUm: number;
	/** A standard step is ⅛ turn, kept within these, µm. */
	readonly stepLowUm: number;
	readonly stepHighUm: number;
	/** Share of an animal's recording bundles advised on one day, lowering left out. */
	readonly dayShare: number;

	/** Lowering: travel a day, hours between moves, and distances from the layer, µm. */
	readonly dailyLimitUm: number;
	readonly loweringRestH: number;
	readonly farUm: number;
	readonly nearUm: number;
	/** Largest step within `nearUm`; mice have a thin layer and take 30. */
	readonly nearStepUm: number;

	/** Impedance: limits of a working channel, days a reading holds, share of bad ones on a shank. */
	readonly shortBelowKohm: number;
	readonly openAboveKohm: number;
	readonly impedanceDays: number;
	readonly shankBadShare: number;
}

/** Rat practice; the lab and its species set their own. */
export const ADVICE_DEFAULTS: AdviceParameters = {
	watchRunDays: 60,
	advanceRunDays: 500,
	fall: FALL_SETTINGS,
	seed: 1,
	leastWorthBits: 0.02,
	worthDays: 5,
	settlingH: 24,
	smallSettlingH: 12,
	smallMoveUm: 40,
	leastTallies: 5,
	advanceTallies: 8,
	latelyTallies: 2,
	latelyDays: 5,
	commonAble: 4,
	commonShare: 0.4,
	fallSds: 2,
	ableP: 0.025,
	landmarkDays: 3,
	criticalH: 48,
	reserveUm: 100,
	stepLowUm: 30,
	stepHighUm: 50,
	dayShare: 0.25,
	dailyLimitUm: 200,
	loweringRestH: 2,
	farUm: 500,
	nearUm: 300,
	nearStepUm: 50,
	shortBelowKohm: 50,
	openAboveKohm: 3000,
	impedanceDays: 14,
	shankBadShare: 0.25
};
