import { coherence } from '../maps/coherence';
import { fieldRule } from '../maps/fields';
import { keptTime, spikeCells } from '../maps/kept-time';
import { neighboursOf } from '../maps/neighbours';
import { rawRates } from '../maps/raw-rates';
import { drawShifts, shiftTest } from '../maps/shift-test';
import { smoothedInformation } from '../maps/smoothed-information';
import { spikeCountsInto } from '../maps/spike-counts';
import { unitMaps, type MapInput, type UnitMaps } from '../maps/unit-maps';
import { seeded } from '../random/seeded';
import { pearson } from '../statistics/pearson';
import { describeMap } from './describe-map';
import type { SessionParameters } from './parameters';
import type { Ground, Path, UnitSpikes } from './prepared';
import { figure, type MapResult, type UnitResult } from './result';
import { halves, oddAndEven, usedWhere } from './sample-masks';

/**
 * Maps of all units over the used samples, and every figure of the result that is of one unit.
 * @param onUnit told the number of units done
 */
export function analyseUnits(
	ground: Ground,
	path: Path,
	units: readonly UnitSpikes[],
	parameters: SessionParameters,
	onUnit: (done: number) => void
): { maps: UnitMaps; results: UnitResult[] } {
	const { arena, bins } = ground;
	const input = mapInput(ground, path);
	const samples = units.map((unit) => unit.samples);
	const mapsOf = (isUsed: Uint8Array) => unitMaps(input, samples, isUsed);
	const maps = mapsOf(path.isUsed);
	const [first, second] = halves(path).map(mapsOf);
	const [odd, even] = oddAndEven(path).map(mapsOf);
	const direction = path.laps?.direction;
	const ways =
		arena.kind === 'straight' && direction
			? ([1, -1] as const).map((way) => usedWhere(path, (i) => direction[i] === way))
			: null;
	const wayMaps = ways?.map(mapsOf);
	const touching = neighboursOf(arena, bins, false);
	const around = neighboursOf(arena, bins, true);
	const rule = fieldRule(bins);
	const counts = new Float64Array(bins.count);
	const kept = keptTime(path.bin, path.standS, path.isUsed, path.medianIntervalS);
	const shifts = drawShifts(kept, parameters.shuffles, seeded(parameters.seed, 'shift'));
	const bits = smoothedInformation(maps.occupancyS, ground.smooth, ground.minOccupancyS);
	const describe = (from: UnitMaps, isUsed: Uint8Array, u: number): MapResult => {
		const used = units[u].samples.reduce((sum, i) => sum + (i >= 0 ? isUsed[i] : 0), 0);
		return describeMap(bins, touching, rule, mapOf(from, u, bins.count), from.occupancyS, used);
	};
	const results = units.map((unit, u): UnitResult => {
		const pooled = describe(maps, path.isUsed, u);
		spikeCountsInto(counts, unit.samples, path.bin, path.isUsed);
		const raw = rawRates(counts, maps.occupancyS, ground.minOccupancyS);
		const cells = spikeCells(kept, unit.timesS, unit.samples, path.tS, path.isUsed);
		const test = shiftTest(
			kept,
			cells,
			pooled.informationBitsPerSpike === null ? new Int32Array(0) : shifts,
			bins.count,
			pooled.informationBitsPerSpike ?? NaN,
			bits
		);
		onUnit(u + 1);
		return {
			unit: unit.unit,
			bundle: unit.bundle,
			spikes: unit.timesS.length,
			...pooled,
			informationP: figure(test.p),
			coherence: figure(coherence(raw, around)),
			splitHalfR: figure(pearson(mapOf(first, u, bins.count), mapOf(second, u, bins.count))),
			oddEvenR: figure(pearson(mapOf(odd, u, bins.count), mapOf(even, u, bins.count))),
			directions:
				ways && wayMaps
					? { up: describe(wayMaps[0], ways[0], u), down: describe(wayMaps[1], ways[1], u) }
					: null
		};
	});
	return { maps, results };
}

/** What maps read of a session. */
export function mapInput(ground: Ground, path: Path): MapInput {
	return {
		bin: path.bin,
		standS: path.standS,
		bins: ground.bins.count,
		smooth: ground.smooth,
		minOccupancyS: ground.minOccupancyS
	};
}

function mapOf(maps: UnitMaps, unit: number, bins: number): Float64Array {
	return maps.ratesHz.subarray(unit * bins, (unit + 1) * bins);
}
