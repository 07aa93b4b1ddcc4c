import { occupancyInto } from '../maps/occupancy';
import { keptTime, spikeCells } from '../maps/kept-time';
import { drawShifts } from '../maps/shift-test';
import { shiftedSmoothedInformation } from '../maps/shifted-smoothed-information';
import { seeded } from '../random/seeded';
import type { SessionParameters } from './parameters';
import type { Ground, Path, UnitSpikes } from './prepared';

/** Information per spike of a unit's shifted spikes, one value per shift; empty for no test. */
export type ShiftedUnit = (unit: number) => Float64Array;

/**
 * The null figures of the circular-shift test, unit by unit: any part of the units may be asked of
 * any thread, the answers are the same.
 */
export function shiftedUnits(
	ground: Ground,
	path: Path,
	units: readonly UnitSpikes[],
	parameters: SessionParameters
): ShiftedUnit {
	const kept = keptTime(path.bin, path.standS, path.isUsed, path.medianIntervalS);
	const shifts = drawShifts(kept, parameters.shuffles, seeded(parameters.seed, 'shift'));
	const occupancyS = new Float64Array(ground.bins.count);
	occupancyInto(occupancyS, path.bin, path.standS, path.isUsed);
	const { smooth, minOccupancyS } = ground;
	const most = units.reduce((top, { used }) => Math.max(top, used), 0);
	const figures = shiftedSmoothedInformation(kept, shifts, occupancyS, smooth, minOccupancyS, most);
	return (u) => {
		const { timesS, samples, used } = units[u];
		if (used === 0 || shifts.length === 0) return new Float64Array(0);
		return figures(spikeCells(kept, timesS, samples, path.tS, path.isUsed));
	};
}
