import { yieldOf } from '../trends/bundle-baseline';
import { nextFall, passFall, startFall, type FallState } from '../trends/fall-chart';
import { commonCause, shownFall, type CommonCause } from './common-cause';
import type { AnimalHistory, BundleHistory, RecordedDay } from './history';
import type { AdviceParameters } from './parameters';
import { settledAtH } from './settled';

/** A bundle's chart of one reader's counts with the days behind it. */
export interface Followed {
	readonly fall: FallState;
	/** Days that counted since the chart began, oldest first. */
	readonly counted: readonly RecordedDay[];
}

/** Every bundle's chart, and what each day said of all of them together. */
export interface FollowedAnimal {
	/** Charts by bundle, then by reader. */
	readonly bundles: ReadonlyMap<string, ReadonlyMap<string, Followed>>;
	readonly causes: ReadonlyMap<number, CommonCause>;
}

/** Before the first day. */
export const NOTHING_FOLLOWED: FollowedAnimal = { bundles: new Map(), causes: new Map() };

/**
 * Follows all recording bundles of an animal day by day. A chart begins anew after every settled
 * move and every change of setup, and every reader has a chart of their own: a step of all bundles
 * on a change of person is no fall. Days left out, and days before a move has settled, count for
 * nothing. A day with a common cause adds no evidence and teaches nothing; the next day is compared
 * with it, so that a step shared by all stays without consequence.
 * @param today days after it are not looked at
 * Cost: O(bundles · days).
 */
export function followAnimal(
	animal: AnimalHistory,
	today: number,
	parameters: AdviceParameters
): FollowedAnimal {
	const days = new Set(animal.bundles.flatMap((bundle) => bundle.days.map(({ day }) => day)));
	return [...days]
		.filter((day) => day <= today)
		.sort((a, b) => a - b)
		.reduce((followed, day) => followDay(followed, animal, day, parameters), NOTHING_FOLLOWED);
}

/**
 * Follows one more day; what was followed before stays as it was.
 * @param day later than every day followed so far
 */
export function followDay(
	before: FollowedAnimal,
	animal: AnimalHistory,
	day: number,
	parameters: AdviceParameters
): FollowedAnimal {
	const records = recordsOf(animal, day, parameters);
	if (records.length === 0) return before;
	const begun = records.map((usable) => {
		const charts = before.bundles.get(usable.bundle.bundle);
		return begin(charts?.get(usable.record.reader), usable);
	});
	const cause = causeOf(animal, day, records, begun, parameters);
	const bundles = new Map(before.bundles);
	records.forEach(({ bundle, record, follows }, i) => {
		const { fall, counted } = begun[i] ?? { fall: startFall(parameters.fall), counted: [] };
		const yieldDay = {
			day,
			units: record.units,
			kept: fall.last?.day === follows ? record.kept : null,
			lnAmplitude: record.lnAmplitude ?? NaN
		};
		const next = cause.isCommon
			? { fall: passFall(fall, yieldDay), counted }
			: { fall: nextFall(fall, yieldDay, parameters.fall), counted: [...counted, record] };
		const charts = before.bundles.get(bundle.bundle);
		bundles.set(bundle.bundle, new Map(charts).set(record.reader, next));
	});
	return { bundles, causes: new Map(before.causes).set(day, cause) };
}

interface Usable {
	readonly bundle: BundleHistory;
	readonly record: RecordedDay;
	/** The recorded day before in the bundle's list, to which its kept units relate. */
	readonly follows: number | null;
}

/** Settled records of recording bundles on a day, those left out aside. */
function recordsOf(
	{ bundles }: AnimalHistory,
	day: number,
	parameters: AdviceParameters
): Usable[] {
	const usable: Usable[] = [];
	for (const bundle of bundles) {
		if (bundle.role !== 'record') continue;
		const at = bundle.days.findLastIndex((record) => record.day === day);
		if (at < 0) continue;
		const record = bundle.days[at];
		if (record.isLeftOut || record.atH < settledAtH(bundle.moves, record.atH, parameters)) continue;
		usable.push({ bundle, record, follows: at === 0 ? null : bundle.days[at - 1].day });
	}
	return usable;
}

/** The chart so far; null when there is none, or the bundle moved or its setup changed since. */
function begin(followed: Followed | undefined, { bundle, record }: Usable): Followed | null {
	const last = followed?.counted.at(-1);
	if (!followed || !last || last.setup !== record.setup) return null;
	const hasMoved = bundle.moves.some(({ atH }) => atH > last.atH && atH <= record.atH);
	return hasMoved ? null : followed;
}

function causeOf(
	{ neighbours }: AnimalHistory,
	day: number,
	records: readonly Usable[],
	begun: readonly (Followed | null)[],
	parameters: AdviceParameters
): CommonCause {
	let able = 0;
	let fell = 0;
	records.forEach(({ record }, i) => {
		const fall = begun[i]?.fall;
		if (!fall?.last || fall.recorded < parameters.leastTallies) return;
		const { isAble, hasFallen } = shownFall(
			{
				model: yieldOf(fall.baseline),
				previous: fall.last.units,
				today: record.units,
				gapDays: day - fall.last.day
			},
			parameters
		);
		if (isAble) able++;
		if (hasFallen) fell++;
	});
	const own = commonCause(able, fell, parameters);
	const shared = neighbours.filter((one) => one.day === day);
	if (own.isCommon || shared.length === 0) return own;
	const sum = (of: 'able' | 'fell') => shared.reduce((total, one) => total + one[of], 0);
	return commonCause(able + sum('able'), fell + sum('fell'), parameters);
}
