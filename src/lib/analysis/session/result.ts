import type { PutativeType } from '../quality/putative-type';
import type { QualityLevel } from '../quality/quality-class';
import type { SessionParameters } from './parameters';

/** A figure, or null when it cannot be computed; `warnings` then says why. */
export type Figure = number | null;
/** A place in cm; the second number is null in one dimension. */
export type Place = [number, Figure];

export interface FieldResult {
	readonly peakRateHz: number;
	readonly peakCm: Place;
	readonly centreCm: Place;
	/** Length along the track, null in two dimensions. */
	readonly sizeCm: Figure;
	/** Null in one dimension. */
	readonly areaCm2: Figure;
}

/** A map and what it says; of all used samples, or of one running direction. */
export interface MapResult {
	readonly spikesUsed: number;
	/** Used spikes over used time. */
	readonly meanRateHz: Figure;
	readonly peakRateHz: Figure;
	readonly peakCm: Place | null;
	readonly informationBitsPerSpike: Figure;
	readonly informationBitsPerS: Figure;
	readonly sparsity: Figure;
	readonly fields: readonly FieldResult[];
	readonly ratesHzByBin: readonly Figure[];
}

/** How far a unit can be trusted as one cell; null where the figure's data were not handed in. */
export interface QualityResult {
	/** The worst of the figures that are known, by the thresholds of that name. */
	readonly level: QualityLevel;
	readonly thresholds: string;
	/** Spike pairs closer than 2 ms. */
	readonly refractoryViolations: number;
	/** Share of inter-spike intervals under 2 ms. */
	readonly violationShare: Figure;
	/** Share of foreign spikes if they come from one other unit; null when half or more may be. */
	readonly contamination: Figure;
	/** Upper limit when no violation was seen; null otherwise, or when the session cannot tell. */
	readonly contaminationLimit95: Figure;
	/** Share of 5-minute bins with a spike. */
	readonly presenceRatio: Figure;
	readonly peakToPeakUv: Figure;
	readonly signalToNoise: Figure;
	readonly troughToPeakMs: Figure;
	readonly isolationDistance: Figure;
	readonly lRatio: Figure;
	readonly featuresUsed: number;
	/** Numbers of features left out because their wire was dead. */
	readonly deadFeatures: readonly number[];
	/** From the units table, else guessed from width and rate; null when neither is known. */
	readonly type: PutativeType | null;
}

export interface UnitResult extends MapResult {
	readonly unit: string;
	readonly bundle: string | null;
	/** All spikes in the file. */
	readonly spikes: number;
	readonly informationP: Figure;
	/** Correlation r with the mean of the neighbours, unsmoothed map. */
	readonly coherence: Figure;
	readonly splitHalfR: Figure;
	readonly oddEvenR: Figure;
	/** Straight tracks only. */
	readonly directions: { readonly up: MapResult; readonly down: MapResult } | null;
}

/** A unit as the result tells it: its map, and how far it is one cell. */
export interface SessionUnit extends UnitResult {
	readonly quality: QualityResult;
}

export interface BundleWorth {
	readonly bundle: string;
	readonly units: number;
	readonly medianErrorWithoutCm: Figure;
	readonly bits: Figure;
	readonly bitsCi90: [number, number] | null;
}

export interface DropPoint {
	readonly units: number;
	readonly medianErrorCm: number;
	readonly p10: number;
	readonly p90: number;
}

export interface DecodingResult {
	readonly unitsUsed: number;
	readonly windows: number;
	readonly medianErrorCm: Figure;
	readonly medianErrorCi95Cm: [number, number] | null;
	readonly meanErrorCm: Figure;
	readonly p95ErrorCm: Figure;
	readonly fractionWithin10Cm: Figure;
	readonly chanceMedianErrorCm: Figure;
	readonly coverage95: Figure;
	readonly floorMedianErrorCm: Figure;
	readonly memory: { readonly medianErrorCm: Figure };
	readonly worthByBundle: readonly BundleWorth[];
	readonly unitDropCurve: readonly DropPoint[];
}

export interface PositionInputs {
	readonly samples: number;
	readonly durationS: number;
	readonly medianIntervalS: number;
	/** Time between first and last sample for which no sample stands. */
	readonly gapsS: number;
}

export interface SpikeInputs {
	readonly spikes: number;
	readonly units: number;
	/** Spikes at moments with no position. */
	readonly outsidePosition: number;
}

export interface OccupancyResult {
	readonly binsX: number;
	readonly binsY: number;
	readonly edgesXCm: readonly number[];
	readonly edgesYCm: readonly number[] | null;
	/** Row-major, y rows; null where the animal never was. */
	readonly secondsByBin: readonly Figure[];
}

/**
 * `quarterturn/session-analysis@1` as this package computes it. Whoever stores or prints it adds the
 * digests of the inputs, `codeVersion`, `startedAt` and `elapsedS`.
 */
export interface SessionResult {
	readonly schema: 'quarterturn/session-analysis@1';
	readonly parameters: SessionParameters;
	readonly inputs: { readonly position: PositionInputs; readonly spikes: SpikeInputs };
	readonly occupancy: OccupancyResult;
	readonly units: readonly SessionUnit[];
	readonly decoding: DecodingResult;
	readonly warnings: readonly string[];
}

/** NaN and infinities become null. */
export function figure(value: number): Figure {
	return Number.isFinite(value) ? value : null;
}

/** An interval, or null when either end is undefined. */
export function interval([low, high]: [number, number]): [number, number] | null {
	return Number.isFinite(low) && Number.isFinite(high) ? [low, high] : null;
}
