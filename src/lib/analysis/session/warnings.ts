import { LEAST_GROUPS } from '../decoding/bootstrap';
import { LEAST_TEST_S } from '../maps/shift-test';
import { LEAST_SPIKES } from './decode-session';
import type { Path } from './prepared';
import type { DecodingResult, UnitResult } from './result';

/** Information from fewer used spikes is mostly bias. */
const TRUSTED_SPIKES = 50;

function named(units: readonly UnitResult[]): string {
	return units.map(({ unit }) => unit).join(', ');
}

/** Says why figures of units are missing or not to be trusted. */
export function warnAboutUnits(
	warnings: string[],
	path: Path,
	units: readonly UnitResult[],
	hasMaps: boolean
): void {
	if (!hasMaps) {
		warnings.push(
			`Only ${path.usedS.toFixed(1)} s of running were used; under ${LEAST_TEST_S} s no map, test or decoding is made.`
		);
		return;
	}
	const silent = units.filter(({ spikesUsed }) => spikesUsed === 0);
	if (silent.length > 0) {
		warnings.push(
			`Without a spike during running, so without information or field: ${named(silent)}.`
		);
	}
	const few = units.filter(({ spikesUsed }) => spikesUsed > 0 && spikesUsed < TRUSTED_SPIKES);
	if (few.length > 0) {
		warnings.push(
			`Under ${TRUSTED_SPIKES} used spikes, so information is biased upwards and says little: ${named(few)}.`
		);
	}
	const unstable = units.filter(
		({ spikesUsed, splitHalfR, oddEvenR }) =>
			spikesUsed > 0 && (splitHalfR === null || oddEvenR === null)
	);
	if (unstable.length > 0) {
		warnings.push(
			`Silent in one half or in every second lap, so without that correlation: ${named(unstable)}.`
		);
	}
	if (path.groups.round === null) {
		warnings.push(
			'No laps, or fewer than five: blocks of 20 s stand in for them in odd–even correlation and intervals.'
		);
	}
}

/** Says why figures of decoding are missing. */
export function warnAboutDecoding(
	warnings: string[],
	path: Path,
	decoding: DecodingResult,
	folds: number,
	hasMaps: boolean
): void {
	if (!hasMaps) return;
	if (decoding.unitsUsed === 0) {
		warnings.push(`No unit has ${LEAST_SPIKES} used spikes, so position was not decoded.`);
		return;
	}
	if (decoding.medianErrorCm === null) {
		warnings.push(
			decoding.windows < folds
				? `${decoding.windows} windows are fewer than ${folds} folds, so position was not decoded.`
				: 'Outside one fold no bin was visited long enough, so position was not decoded.'
		);
		return;
	}
	if (decoding.medianErrorCi95Cm === null) {
		warnings.push(
			`${path.groups.count} laps or blocks are fewer than ${LEAST_GROUPS}, so decoding has no interval.`
		);
	}
	if (decoding.chanceMedianErrorCm === null) {
		warnings.push('Under 20 windows: chance was not computed.');
	}
	if (decoding.floorMedianErrorCm === null) {
		warnings.push('In half the windows the maps have no slope, so there is no theoretical floor.');
	}
	if (decoding.memory.medianErrorCm === null) {
		warnings.push('No two windows follow each other, so there is no decoding with memory.');
	}
	if (decoding.worthByBundle.length === 0) {
		warnings.push('The units have no bundle, so no bundle has a worth.');
	}
}
