import { drawnMeans } from '../decoding/bootstrap';
import { decodeWithoutBundles, everyWindow } from '../decoding/bundle-worth';
import { decodeSubsets, subsetSizes } from '../decoding/unit-drop';
import { widenedInterval } from '../decoding/widened-interval';
import type { Random } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { mean } from '../statistics/mean';
import { median, quantile } from '../statistics/quantile';
import type { DecodedSession } from './decode-session';
import { figure, interval, type BundleWorth, type DropPoint } from './result';

/** Random orders of the units behind the curve. */
const REPETITIONS = 20;

/**
 * What decoding loses without each bundle, in the order of first mention.
 * @param group what is drawn for intervals, per window
 * @param draws empty when there are too few groups for an interval
 */
export function worthByBundle(
	session: DecodedSession,
	group: Int32Array,
	draws: readonly Int32Array[]
): BundleWorth[] {
	const { units, models, folds, counts, windowS, trueBin } = session;
	const names = [...new Set(units.flatMap(({ bundle }) => bundle ?? []))];
	if (names.length === 0) return [];
	const bundleOf = Int32Array.from(units, ({ bundle }) => names.indexOf(bundle ?? ''));
	const looked = everyWindow(
		trueBin.length,
		placesOf(session) * (3 * names.length + perWindow(session))
	);
	const without = decodeWithoutBundles(
		models,
		folds,
		counts,
		windowS,
		trueBin,
		bundleOf,
		names.length,
		looked
	);
	const groups = draws[0]?.length ?? 0;
	const lookedGroup = Int32Array.from(looked, (w) => group[w]);
	return names.map((bundle, b) => {
		const bits = without.bits[b];
		const errors = Float64Array.from(without.bin[b], (bin, k) => session.errorCm(bin, looked[k]));
		const drawn = drawnMeans(bits, lookedGroup, groups, draws);
		return {
			bundle,
			units: bundleOf.reduce((sum, k) => sum + (k === b ? 1 : 0), 0),
			medianErrorWithoutCm: figure(median(errors)),
			bits: figure(mean(bits.filter((value) => !Number.isNaN(value)))),
			bitsCi90: interval(widenedInterval(drawn, 0.9, groups))
		};
	});
}

/** Median error by number of units, over random subsets. */
export function dropCurve(session: DecodedSession, random: Random): DropPoint[] {
	const { units, models, folds, counts, windowS, trueBin } = session;
	const sizes = subsetSizes(units.length);
	const looked = everyWindow(
		trueBin.length,
		REPETITIONS * placesOf(session) * (2 * sizes.length + perWindow(session))
	);
	const medians = sizes.map(() => new Float64Array(REPETITIONS));
	for (let r = 0; r < REPETITIONS; r++) {
		const order = shuffled(units.length, random);
		decodeSubsets(models, folds, counts, windowS, order, sizes, looked).forEach((bins, s) => {
			medians[s][r] = median(Float64Array.from(bins, (bin, k) => session.errorCm(bin, looked[k])));
		});
	}
	return sizes.map((size, s) => ({
		units: size,
		medianErrorCm: median(medians[s]),
		p10: quantile(medians[s], 0.1),
		p90: quantile(medians[s], 0.9)
	}));
}

function placesOf({ models }: DecodedSession): number {
	return Math.max(...models.map((model) => model?.bin.length ?? 0));
}

/** Spiking units in a window, on average. */
function perWindow({ counts, trueBin }: DecodedSession): number {
	return counts.unit.length / trueBin.length;
}
