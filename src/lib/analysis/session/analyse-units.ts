import { coherence } from '../maps/coherence';
import { fieldRule } from '../maps/fields';
import { neighboursOf } from '../maps/neighbours';
import { rawRates } from '../maps/raw-rates';
import { shiftTest } from '../maps/shift-test';
import { spikeCountsInto } from '../maps/spike-counts';
import { unitMaps, type MapInput, type UnitMaps } from '../maps/unit-maps';
import { pearson } from '../statistics/pearson';
import { describeMap } from './describe-map';
import type { Ground, Path, UnitSpikes } from './prepared';
import { figure, type MapResult, type UnitResult } from './result';
import { halves, oddAndEven, usedWhere } from './sample-masks';
import type { ShiftedUnit } from './shifted-units';

const NOTHING = new Float64Array(0);

/**
 * Maps of all units over the used samples, and every figure of the result that is of one unit.
 * @param shifted null figures of the shift test
 * @param onUnit  told the number of units done
 */
export function analyseUnits(
	ground: Ground,
	path: Path,
	units: readonly UnitSpikes[],
	shifted: ShiftedUnit,
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
	const describe = (from: UnitMaps, isUsed: Uint8Array, u: number): MapResult => {
		const used = units[u].samples.reduce((sum, i) => sum + (i >= 0 ? isUsed[i] : 0), 0);
		return describeMap(bins, touching, rule, mapOf(from, u, bins.count), from.occupancyS, used);
	};
	const results = units.map((unit, u): UnitResult => {
		const pooled = describe(maps, path.isUsed, u);
		spikeCountsInto(counts, unit.samples, path.bin, path.isUsed);
		const raw = rawRates(counts, maps.occupancyS, ground.minOccupancyS);
		const observed = pooled.informationBitsPerSpike;
		const { p } = shiftTest(observed ?? NaN, observed === null ? NOTHING : shifted(u));
		onUnit(u + 1);
		return {
			unit: unit.unit,
			bundle: unit.bundle,
			spikes: unit.timesS.length,
			...pooled,
			informationP: figure(p),
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
