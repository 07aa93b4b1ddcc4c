import {
	contamination,
	contaminationFloor,
	contaminationLimit,
	type ViolationCount
} from '../quality/contamination';
import { isolation } from '../quality/isolation';
import { MAZE_PRESENCE_BIN_S, presenceRatio } from '../quality/presence-ratio';
import { putativeType, type PutativeType } from '../quality/putative-type';
import { qualityClass } from '../quality/quality-class';
import { REFRACTORY_S, refractoryViolations } from '../quality/refractory-violations';
import { signalToNoise } from '../quality/signal-to-noise';
import { troughToPeakMs } from '../quality/trough-to-peak';
import type { BundleFeatures } from '../tables/features-table';
import type { UnitRow } from '../tables/units-table';
import type { MeanWaveform } from '../tables/waveforms-table';
import type { UnitEvidence, UnitInput } from './input';
import { figure, type QualityResult } from './result';

const NO_EVIDENCE: UnitEvidence = {
	rows: [],
	waveforms: [],
	waveformHz: null,
	features: []
};

/**
 * Quality of every unit, from its spikes and from what else was handed in. Spikes alone give
 * violations, contamination and presence; a units table gives noise; mean waveforms size, width and
 * with the noise the signal to noise; features isolation.
 * @param fromS, toS  recorded time on the session's clock
 * @throws RangeError toS not after fromS
 * Cost: O(spikes), and with features O(units · spikes of the bundle · features²).
 */
export function unitQuality(
	units: readonly UnitInput[],
	fromS: number,
	toS: number,
	evidence: UnitEvidence = NO_EVIDENCE
): QualityResult[] {
	return units.map((unit): QualityResult => {
		const { timesS } = unit;
		const violations = refractoryViolations(timesS);
		const count: ViolationCount = {
			spikes: timesS.length,
			durationS: toS - fromS,
			violations: violations.pairs,
			refractoryS: REFRACTORY_S,
			deadTimeS: 0
		};
		const share = contamination(count);
		const limit = contaminationLimit(count);
		const presence = presenceRatio(timesS, fromS, toS, MAZE_PRESENCE_BIN_S);
		const row = only(evidence.rows, unit);
		const waveform = only(evidence.waveforms, unit);
		const widthMs =
			waveform && evidence.waveformHz ? troughToPeakMs(waveform, evidence.waveformHz) : NaN;
		const size = sizeOf(waveform, row?.noiseUv ?? NaN);
		const apart = isolationOf(unit, evidence.features);
		const graded = qualityClass({
			violationShare: violations.shareOfIntervals,
			contamination: share,
			contaminationLimit: limit,
			contaminationFloor: contaminationFloor(count),
			presenceRatio: presence,
			signalToNoise: size.ratio,
			isolationDistance: apart?.distance ?? NaN,
			lRatio: apart?.lRatio ?? NaN
		});
		return {
			level: graded.level,
			thresholds: graded.thresholds,
			refractoryViolations: violations.pairs,
			violationShare: figure(violations.shareOfIntervals),
			contamination: figure(share.oneUnit),
			contaminationLimit95: limit && figure(limit.oneUnit),
			presenceRatio: figure(presence),
			peakToPeakUv: figure(size.peakToPeakUv),
			signalToNoise: figure(size.ratio),
			troughToPeakMs: figure(widthMs),
			isolationDistance: figure(apart?.distance ?? NaN),
			lRatio: figure(apart?.lRatio ?? NaN),
			featuresUsed: apart?.dimensionsUsed ?? 0,
			deadFeatures: apart ? apart.deadDimensions.map((d) => d + 1) : [],
			type: typeOf(row, widthMs, timesS.length / (toS - fromS))
		};
	});
}

/** What a table says of a unit; nothing when it names the label in several bundles and the spikes none. */
function only<Named extends UnitRow | MeanWaveform>(
	named: readonly Named[],
	unit: UnitInput
): Named | null {
	const sameLabel = named.filter((one) => one.unit === unit.unit);
	const exact = sameLabel.find((one) => one.bundle === unit.bundle);
	if (exact) return exact;
	const open = sameLabel.filter((one) => one.bundle === null || unit.bundle === null);
	return open.length === 1 ? open[0] : null;
}

function sizeOf(
	waveform: MeanWaveform | null,
	noiseUv: number
): { peakToPeakUv: number; ratio: number } {
	if (!waveform) return { peakToPeakUv: NaN, ratio: NaN };
	// One noise figure a unit is all that a units table holds.
	return signalToNoise(waveform, new Float64Array(waveform.channels).fill(noiseUv));
}

function isolationOf(unit: UnitInput, features: readonly BundleFeatures[]) {
	const found = features.filter(
		({ bundle, units }) =>
			units.includes(unit.unit) && (unit.bundle === null || bundle === unit.bundle)
	);
	if (found.length !== 1) return null;
	const [{ units, unitOf, values, dimensions }] = found;
	const number = units.indexOf(unit.unit);
	const inside = unitOf.reduce((sum, one) => sum + (one === number ? 1 : 0), 0);
	const cluster = new Float64Array(inside * dimensions);
	const outside = new Float64Array(values.length - cluster.length);
	let c = 0;
	let o = 0;
	for (let i = 0; i < unitOf.length; i++) {
		const row = values.subarray(i * dimensions, (i + 1) * dimensions);
		if (unitOf[i] === number) cluster.set(row, dimensions * c++);
		else outside.set(row, dimensions * o++);
	}
	return isolation({ values: cluster, dimensions }, { values: outside, dimensions });
}

/** A person's class in the units table stands; the guess is made only where there is none. */
function typeOf(row: UnitRow | null, widthMs: number, meanHz: number): PutativeType | null {
	if (row?.class) return row.class;
	return Number.isNaN(widthMs) ? null : putativeType(widthMs, meanHz);
}
