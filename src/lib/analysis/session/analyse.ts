import type { PosteriorStore } from '../decoding/posterior-store';
import { samplesOfSpikes } from '../spikes/samples-of-spikes';
import { analyseUnits } from './analyse-units';
import { checkInput } from './check-input';
import { decodeSession, LEAST_SPIKES, sessionWindows } from './decode-session';
import { describeDecoding, notDecoded } from './describe-decoding';
import type { SessionInput } from './input';
import type { SessionParameters } from './parameters';
import { positionInputs } from './path-inputs';
import { prepareGround, preparePath } from './prepare';
import type { Ground, Path, UnitSpikes } from './prepared';
import { figure, type OccupancyResult, type SessionResult } from './result';
import { shiftedUnits } from './shifted-units';
import { unitQuality } from './unit-quality';
import { warnAboutDecoding, warnAboutUnits } from './warnings';

/** With less used time than this nothing is said about place, s. */
export const LEAST_USED_S = 60;

/** What pages draw, too large for the result. Row-major; bins as in `result.occupancy`. */
export interface SessionArrays {
	/** Path in the arena's coordinates, one value per position sample; NaN without a place. */
	readonly tS: Float64Array;
	readonly xCm: Float64Array;
	readonly yCm: Float64Array;
	readonly speedCmS: Float64Array;
	readonly isUsed: Uint8Array;
	/** +1 up, −1 down, 0 neither; straight tracks only. */
	readonly direction: Int8Array | null;
	/** Position sample of each spike, per unit of the result; −1 for none. */
	readonly spikeSamples: readonly Int32Array[];
	/** [unit][bin], Hz, NaN undefined. */
	readonly ratesHz: Float64Array;
	readonly occupancyS: Float64Array;
	readonly decoding: DecodingArrays | null;
}

export interface DecodingArrays {
	/** One value per window. */
	readonly startS: Float64Array;
	readonly trueXCm: Float64Array;
	readonly trueYCm: Float64Array;
	readonly trueBin: Int32Array;
	readonly decodedBin: Int32Array;
	readonly memoryBin: Int32Array;
	readonly errorCm: Float64Array;
	/** Index in `result.units` of each decoding unit. */
	readonly units: Int32Array;
	readonly posterior: PosteriorStore;
}

/**
 * Analyses one session: maps and figures of every unit, and how well position can be read from all.
 * The same input, parameters and seed give the same result on any machine.
 * @param onProgress share of the work done, 0 to 1
 * @throws TableError or ParameterError when the input can only give nonsense
 */
export function analyseSession(
	input: SessionInput,
	parameters: SessionParameters,
	onProgress: (share: number) => void = () => undefined
): { result: SessionResult; arrays: SessionArrays } {
	const warnings: string[] = [];
	checkInput(input, warnings);
	const ground = prepareGround(parameters);
	const path = preparePath(input, ground, parameters.minSpeedCmS, warnings);
	const units = input.units.map(({ unit, bundle, timesS }): UnitSpikes => {
		const samples = samplesOfSpikes(timesS, path.tS, path.standS);
		const used = samples.reduce((sum, i) => sum + (i >= 0 ? path.isUsed[i] : 0), 0);
		return { unit, bundle, timesS, samples, used };
	});
	const hasMaps = path.usedS >= LEAST_USED_S;
	const mapped = hasMaps ? ground : { ...ground, minOccupancyS: Infinity };
	const shifted = shiftedUnits(mapped, path, units, parameters);
	const { maps, results } = analyseUnits(mapped, path, units, shifted, (done) =>
		onProgress((0.6 * done) / units.length)
	);
	const quality = unitQuality(input.units, ...recordedSpan(input), input.evidence);
	warnAboutUnits(warnings, path, results, hasMaps);
	const windows = sessionWindows(path, parameters.windowMs);
	const session = hasMaps
		? decodeSession(ground, path, units, parameters, windows, (done) =>
				onProgress(0.6 + (0.2 * done) / parameters.folds)
			)
		: null;
	const told = session
		? describeDecoding(session, ground, path, units, maps, parameters.seed)
		: null;
	const enough = units.filter(({ used }) => used >= LEAST_SPIKES).length;
	const decoding = told ? told.result : notDecoded(enough, windows.startS.length);
	warnAboutDecoding(warnings, path, decoding, parameters.folds, hasMaps);
	onProgress(1);
	return {
		result: {
			schema: 'quarterturn/session-analysis@1',
			parameters,
			inputs: {
				position: positionInputs(path.tS, path.medianIntervalS),
				spikes: {
					spikes: units.reduce((sum, { timesS }) => sum + timesS.length, 0),
					units: units.length,
					outsidePosition: units.reduce(
						(sum, { samples }) => sum + samples.reduce((n, i) => n + (i < 0 ? 1 : 0), 0),
						0
					)
				}
			},
			occupancy: occupancyResult(ground, maps.occupancyS),
			units: results.map((unit, u) => ({ ...unit, quality: quality[u] })),
			decoding,
			warnings
		},
		arrays: {
			...pathArrays(path),
			spikeSamples: units.map(({ samples }) => samples),
			ratesHz: maps.ratesHz,
			occupancyS: maps.occupancyS,
			decoding: session &&
				told && {
					startS: windows.startS,
					trueXCm: Float64Array.from(windows.sample, (i) => path.xCm[i]),
					trueYCm: Float64Array.from(windows.sample, (i) => path.yCm[i]),
					trueBin: session.trueBin,
					decodedBin: session.decoded.bin,
					memoryBin: session.memoryBin,
					errorCm: told.errorCm,
					units: Int32Array.from(session.units, (unit) => units.indexOf(unit)),
					posterior: session.posterior
				}
		}
	};
}

/** First and last moment of which the session says anything, s. */
function recordedSpan({ position: { tS }, units }: SessionInput): [number, number] {
	const first = units.reduce((least, { timesS }) => Math.min(least, timesS[0] ?? least), tS[0]);
	const last = units.reduce(
		(most, { timesS }) => Math.max(most, timesS[timesS.length - 1] ?? most),
		tS[tS.length - 1]
	);
	return [first, last];
}

function pathArrays({ tS, xCm, yCm, speedCmS, isUsed, laps }: Path) {
	return { tS, xCm, yCm, speedCmS, isUsed, direction: laps?.direction ?? null };
}

function occupancyResult({ bins }: Ground, occupancyS: Float64Array): OccupancyResult {
	return {
		binsX: bins.binsX,
		binsY: bins.binsY,
		edgesXCm: Array.from(bins.edgesXCm),
		edgesYCm: bins.edgesYCm && Array.from(bins.edgesYCm),
		secondsByBin: Array.from(occupancyS, (seconds) => (seconds > 0 ? figure(seconds) : null))
	};
}
