import { yieldOf } from '../trends/bundle-baseline';
import { fallStatistic, startFall } from '../trends/fall-chart';
import type { EvidenceKind } from '../trends/fall-score';
import type { Evidence } from './advice';
import type { FollowedAnimal, Followed } from './follow';
import type { AnimalHistory, Asking, BundleHistory, Landmark, RecordedDay } from './history';
import type { AdviceParameters } from './parameters';
import type { ThresholdSource } from './thresholds';
import { bestWorth, worthFall } from './worth';

/** Units that a share of quality must rest on, lately and in the baseline. */
const QUALITY_DAYS = 3;
const QUALITY_UNITS = 4;
const USUAL_UNITS = 8;

/** Gathers the numbers that the rules look at, from a bundle's followed days and its records. */
export function evidenceOf(
	bundle: BundleHistory,
	animal: AnimalHistory,
	followed: FollowedAnimal,
	asking: Asking,
	parameters: AdviceParameters,
	thresholds: ThresholdSource
): Evidence {
	const { fall, counted } = atRest(followed.bundles.get(bundle.bundle), bundle, asking, parameters);
	const model = yieldOf(fall.baseline);
	const kind = kindOf(counted);
	const cause = followed.causes.get(asking.day);
	const share = cause?.share ?? NaN;
	const { worths } = bundle;
	return {
		statistic: fallStatistic(fall),
		...thresholds(model, kind),
		kind,
		isByEye: counted.some((day) => day.isByEye),
		model,
		units: counted.at(-1)?.units ?? null,
		tallies: counted.length,
		talliesLately: counted.filter(({ day }) => day > asking.day - parameters.latelyDays).length,
		quality: qualityOf(counted.slice(-QUALITY_DAYS), QUALITY_UNITS),
		usualQuality: qualityOf(counted.slice(0, -QUALITY_DAYS), USUAL_UNITS),
		worth: bestWorth(worths, asking.day, parameters.worthDays),
		hasLostMostWorth:
			animal.hasDecodingAlarm && bundle.bundle === mostWorthLost(animal, asking, parameters),
		landmark: landmarkOf(bundle, asking, parameters)?.place ?? null,
		commonShare: Number.isNaN(share) ? null : share,
		isCommonCause: cause?.isCommon ?? false
	};
}

/**
 * The chart in force: of the readers whose counts are not older than the bundle's last move, the one
 * with most days lately, then with the latest day.
 */
function atRest(
	charts: ReadonlyMap<string, Followed> | undefined,
	{ moves }: BundleHistory,
	asking: Asking,
	{ fall, latelyDays }: AdviceParameters
): Followed {
	const movedAtH = moves.findLast(({ atH }) => atH <= asking.atH)?.atH ?? -Infinity;
	const lately = ({ counted }: Followed) =>
		counted.filter(({ day }) => day > asking.day - latelyDays).length;
	const latest = ({ counted }: Followed) => counted.at(-1)?.atH ?? -Infinity;
	const [first] = [...(charts?.values() ?? [])]
		.filter((chart) => latest(chart) > movedAtH)
		.sort((a, b) => lately(b) - lately(a) || latest(b) - latest(a));
	return first ?? { fall: startFall(fall), counted: [] };
}

/** What the latest days let the chart see; a day without units has no amplitude to show. */
function kindOf(counted: readonly RecordedDay[]): EvidenceKind {
	const lately = counted.slice(-5).filter((day) => day.kept !== null);
	if (lately.length === 0) return 'totals';
	return lately.some((day) => day.lnAmplitude !== null) ? 'kept-new-amplitude' : 'kept-new';
}

/** Share of units passing quality; null when too few were judged. */
function qualityOf(days: readonly RecordedDay[], leastUnits: number): number | null {
	let units = 0;
	let passing = 0;
	for (const day of days) {
		if (day.passing === null) continue;
		units += day.units;
		passing += day.passing;
	}
	return units >= leastUnits ? passing / units : null;
}

/** The latest landmark row of the last days and since the last move: before a move tells nothing. */
function landmarkOf(
	{ landmarks, moves }: BundleHistory,
	{ day, atH }: Asking,
	{ landmarkDays }: AdviceParameters
): Landmark | undefined {
	const movedAtH = moves.findLast((move) => move.atH <= atH)?.atH ?? -Infinity;
	return landmarks.findLast(
		(row) => row.atH > movedAtH && row.atH <= atH && row.day > day - landmarkDays
	);
}

/** Code of the recording bundle whose worth fell most over the last days; null when none fell. */
function mostWorthLost(
	{ bundles }: AnimalHistory,
	{ day }: Asking,
	{ worthDays }: AdviceParameters
): string | null {
	let most = 0;
	let code: string | null = null;
	for (const { bundle, role, worths } of bundles) {
		const fall = role === 'record' ? worthFall(worths, day, worthDays) : NaN;
		if (fall > most) [most, code] = [fall, bundle];
	}
	return code;
}
