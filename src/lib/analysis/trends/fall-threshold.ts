import type { Random } from '../random/seeded';
import { AMPLITUDE, type AmplitudeModel } from './amplitude-evidence';
import { fallScore, type EvidenceKind } from './fall-score';
import { simulatedBundle, simulateDay } from './simulated-bundle';
import { demandModel, type YieldModel } from './yield-model';

/** Steps of the limit that are looked at. */
const STEP = 0.05;
const TOP = 30;

export interface ThresholdOptions {
	/** Bundles simulated. */
	readonly runs?: number;
	readonly amplitude?: AmplitudeModel;
}

/**
 * Limits of the fall chart at which a stable bundle of this model alarms once in so many recorded
 * days on average, by simulating the bundle's own survival and arrivals: tables for independent
 * counts do not hold for units that stay. The baseline counts as known.
 * Each run lasts 2½ of the longest length; a mean run length is the days at risk over the alarms.
 * Monte Carlo error at 300 runs: about 6 % of the run length, 0.06 of the limit.
 * @param fallen  models looked for; the chart is the largest of their sums
 * @param lengths mean run lengths wanted, days, each ≥ 1
 * @returns a limit for each length, natural-log units; never above 30
 * @throws RangeError no length, or one below 1; a model out of range
 * Cost: about 0.1 s at 500 days and 300 runs; keep the result.
 */
export function fallThresholds(
	usual: YieldModel,
	fallen: readonly YieldModel[],
	kind: EvidenceKind,
	lengths: readonly number[],
	random: Random,
	{ runs = 300, amplitude = AMPLITUDE }: ThresholdOptions = {}
): number[] {
	if (lengths.length === 0 || !lengths.every((length) => length >= 1)) {
		throw new RangeError(`run lengths must be at least 1 day: ${lengths.join(', ')}`);
	}
	for (const model of [usual, ...fallen]) demandModel(model);
	const horizon = Math.ceil(2.5 * Math.max(...lengths));
	const score = fallScore(usual, fallen, kind, amplitude);
	const levels = Math.round(TOP / STEP);
	const atRisk = new Float64Array(levels);
	const alarms = new Float64Array(levels);
	const sums = new Float64Array(fallen.length);
	for (let run = 0; run < runs; run++) {
		const bundle = simulatedBundle(usual, random, amplitude);
		sums.fill(0);
		// Levels below `next` have been passed on an earlier day.
		let next = 0;
		for (let day = 1; day <= horizon && next < levels; day++) {
			simulateDay(bundle, usual, 0, random, amplitude);
			const s = score(bundle, sums);
			for (; next < levels && s >= (next + 1) * STEP; next++) {
				atRisk[next] += day;
				alarms[next]++;
			}
		}
		for (; next < levels; next++) atRisk[next] += horizon;
	}
	return lengths.map((length) => firstLevel(atRisk, alarms, length));
}

/** Lowest limit whose run length reaches the wanted one, interpolated in its logarithm. */
function firstLevel(atRisk: Float64Array, alarms: Float64Array, length: number): number {
	const runLength = (level: number) => atRisk[level] / alarms[level];
	let level = 0;
	while (level < atRisk.length && runLength(level) < length) level++;
	if (level === 0 || level === atRisk.length) return Math.min(level + 1, atRisk.length) * STEP;
	const low = Math.log(runLength(level - 1));
	const high = Math.log(runLength(level));
	const part = Number.isFinite(high) ? (Math.log(length) - low) / (high - low) : 1;
	return (level + part) * STEP;
}
