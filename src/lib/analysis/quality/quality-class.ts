import type { Contamination } from './contamination';

/** How far a figure, or a unit, can be trusted. */
export type QualityLevel = 'good' | 'fair' | 'poor' | 'not-known';

/** What was measured of a unit; NaN where it was not. */
export interface QualityFigures {
	/** Share of intervals under the refractory period. */
	readonly violationShare: number;
	readonly contamination: Contamination;
	/** See `contaminationLimit`; null when there were violations. */
	readonly contaminationLimit: Contamination | null;
	/** See `contaminationFloor`. */
	readonly contaminationFloor: Contamination;
	readonly presenceRatio: number;
	readonly signalToNoise: number;
	readonly isolationDistance: number;
	readonly lRatio: number;
}

/** For each figure where good ends and where fair ends. */
export interface QualityThresholds {
	readonly name: string;
	readonly violationShare: readonly [number, number];
	readonly contamination: readonly [number, number];
	/** Presence never makes a unit poor: a place cell is silent while the animal is elsewhere. */
	readonly presenceRatio: number;
	readonly signalToNoise: readonly [number, number];
	readonly isolationDistance: readonly [number, number];
	readonly lRatio: readonly [number, number];
}

/** Common practice; the name is stored with every class made from it. */
export const QUALITY_THRESHOLDS: QualityThresholds = {
	name: 'session@1',
	violationShare: [0.005, 0.01],
	contamination: [0.1, 0.2],
	presenceRatio: 0.9,
	signalToNoise: [5, 3],
	isolationDistance: [20, 10],
	lRatio: [0.05, 0.2]
};

export type Criterion = Exclude<keyof QualityThresholds, 'name'>;

/** Class of a unit and of each figure it stands on. */
export interface QualityClass {
	readonly level: QualityLevel;
	readonly thresholds: string;
	readonly criteria: Readonly<Record<Criterion, QualityLevel>>;
}

/**
 * Class of a unit: the worst of its figures that are known.
 *
 * Contamination is read by the form of one foreign unit, the larger of the two. It makes a unit poor
 * only when chance alone could not have given so many violations. Without a violation
 * its upper limit decides, and where that limit is too wide contamination is not known, never poor:
 * such a session cannot vouch for a unit. It is then fair at best, and not known unless its size or
 * its isolation was measured.
 */
export function qualityClass(
	figures: QualityFigures,
	thresholds: QualityThresholds = QUALITY_THRESHOLDS
): QualityClass {
	const criteria = {
		violationShare: below(figures.violationShare, thresholds.violationShare),
		contamination: contaminationLevel(figures, thresholds.contamination),
		presenceRatio: presenceLevel(figures.presenceRatio, thresholds.presenceRatio),
		signalToNoise: atLeast(figures.signalToNoise, thresholds.signalToNoise),
		isolationDistance: atLeast(figures.isolationDistance, thresholds.isolationDistance),
		lRatio: below(figures.lRatio, thresholds.lRatio)
	};
	return { level: worst(criteria), thresholds: thresholds.name, criteria };
}

function worst(criteria: Readonly<Record<Criterion, QualityLevel>>): QualityLevel {
	const levels = Object.values(criteria);
	if (levels.includes('poor')) return 'poor';
	const { contamination, signalToNoise, isolationDistance, lRatio } = criteria;
	const shape = [signalToNoise, isolationDistance, lRatio];
	if (contamination === 'not-known') {
		return shape.every((level) => level === 'not-known') ? 'not-known' : 'fair';
	}
	return levels.includes('fair') ? 'fair' : 'good';
}

function contaminationLevel(
	{ contamination, contaminationLimit, contaminationFloor }: QualityFigures,
	bounds: readonly [number, number]
): QualityLevel {
	const { q, oneUnit } = contaminationLimit ?? contamination;
	if (Number.isNaN(q)) return 'not-known';
	const level = levelOf(oneUnit, bounds);
	if (level !== 'poor') return level;
	if (contaminationLimit) return 'not-known';
	return levelOf(contaminationFloor.oneUnit, bounds) === 'poor' ? 'poor' : 'fair';
}

/** Without a root at least half of the spikes are foreign, or may be. */
function levelOf(oneUnit: number, bounds: readonly [number, number]): QualityLevel {
	return Number.isNaN(oneUnit) ? 'poor' : upTo(oneUnit, bounds);
}

function presenceLevel(ratio: number, good: number): QualityLevel {
	if (Number.isNaN(ratio)) return 'not-known';
	return ratio >= good ? 'good' : 'fair';
}

function upTo(value: number, [good, fair]: readonly [number, number]): QualityLevel {
	if (value <= good) return 'good';
	return value <= fair ? 'fair' : 'poor';
}

function below(value: number, [good, fair]: readonly [number, number]): QualityLevel {
	if (Number.isNaN(value)) return 'not-known';
	if (value < good) return 'good';
	return value < fair ? 'fair' : 'poor';
}

function atLeast(value: number, [good, fair]: readonly [number, number]): QualityLevel {
	if (Number.isNaN(value)) return 'not-known';
	if (value >= good) return 'good';
	return value >= fair ? 'fair' : 'poor';
}
