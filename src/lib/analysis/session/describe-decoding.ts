import { drawGroups, drawnMedians, LEAST_GROUPS } from '../decoding/bootstrap';
import { chanceMedian } from '../decoding/chance';
import { errorSummary } from '../decoding/error-summary';
import { precisionLimitCm } from '../decoding/precision-limit';
import { rateModel } from '../decoding/rate-model';
import { widenedInterval } from '../decoding/widened-interval';
import type { UnitMaps } from '../maps/unit-maps';
import { seeded } from '../random/seeded';
import { mean } from '../statistics/mean';
import { median } from '../statistics/quantile';
import type { DecodedSession } from './decode-session';
import type { Ground, Path, UnitSpikes } from './prepared';
import { figure, interval, type DecodingResult } from './result';
import { dropCurve, worthByBundle } from './unit-and-bundle-worth';

/** Draws behind an interval. */
const DRAWS = 1000;

/** A session that could not be decoded: what it had, and nothing else. */
export function notDecoded(unitsUsed: number, windows: number): DecodingResult {
	return {
		unitsUsed,
		windows,
		medianErrorCm: null,
		medianErrorCi95Cm: null,
		meanErrorCm: null,
		p95ErrorCm: null,
		fractionWithin10Cm: null,
		chanceMedianErrorCm: null,
		coverage95: null,
		floorMedianErrorCm: null,
		memory: { medianErrorCm: null },
		worthByBundle: [],
		unitDropCurve: []
	};
}

/**
 * The figures of a decoded session.
 * @param all  all units of the session, `maps` their maps in the same order
 * @returns the result and the error of every window, cm
 */
export function describeDecoding(
	session: DecodedSession,
	ground: Ground,
	path: Path,
	all: readonly UnitSpikes[],
	maps: UnitMaps,
	seed: number
): { result: DecodingResult; errorCm: Float64Array } {
	const { decoded, errorCm: error, windows } = session;
	const errorCm = Float64Array.from(decoded.bin, error);
	const summary = errorSummary(errorCm);
	const group = Int32Array.from(windows.sample, (i) => path.groups.ofSample[i]);
	const isDrawable = path.groups.count >= LEAST_GROUPS;
	const draws = isDrawable ? drawGroups(path.groups.count, DRAWS, seeded(seed, 'interval')) : [];
	const medians = drawnMedians(errorCm, group, draws);
	const remembered = session.memoryBin.includes(-1)
		? NaN
		: median(Float64Array.from(session.memoryBin, error));
	const result: DecodingResult = {
		unitsUsed: session.units.length,
		windows: windows.startS.length,
		medianErrorCm: figure(summary.medianCm),
		medianErrorCi95Cm: interval(widenedInterval(medians, 0.95, path.groups.count)),
		meanErrorCm: figure(summary.meanCm),
		p95ErrorCm: figure(summary.p95Cm),
		fractionWithin10Cm: figure(summary.fractionWithin10Cm),
		chanceMedianErrorCm: figure(
			chanceMedian(errorCm.length, (answered, at) => error(decoded.bin[answered], at))
		),
		coverage95: figure(mean(decoded.isCovered)),
		floorMedianErrorCm: figure(limitCm(session, ground, all, maps)),
		memory: { medianErrorCm: figure(remembered) },
		worthByBundle: worthByBundle(session, group, draws),
		unitDropCurve: dropCurve(session, seeded(seed, 'subset'))
	};
	return { result, errorCm };
}

/** The limit from the maps of all used time: the best guess of the true ones. */
function limitCm(
	session: DecodedSession,
	{ bins, minOccupancyS }: Ground,
	all: readonly UnitSpikes[],
	maps: UnitMaps
): number {
	const rates = new Float64Array(session.units.length * bins.count);
	session.units.forEach((unit, k) => {
		const u = all.indexOf(unit);
		rates.set(maps.ratesHz.subarray(u * bins.count, (u + 1) * bins.count), k * bins.count);
	});
	const isDefined = (bin: number) => maps.occupancyS[bin] >= minOccupancyS;
	const model = rateModel(rates, maps.occupancyS, isDefined, 'even');
	return model ? precisionLimitCm(model, bins, session.trueBin, session.windowS) : NaN;
}
