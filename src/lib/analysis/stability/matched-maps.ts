/** Maps of the units of one day; all days with the same bins and smoothing. */
export interface DayMaps {
	/** Lab days since some first one. */
	readonly day: number;
	readonly bins: number;
	/** Row-major [unit][bin], Hz, NaN undefined. */
	readonly ratesHz: Float64Array;
	/** Mean rate of each unit over the time that was mapped. */
	readonly meanHz: Float64Array;
	/** Lineage of each unit. */
	readonly lineage: Int32Array;
	/** Bundle of each unit. */
	readonly bundle: Int32Array;
}

/** Units seen on both of two days, row by row the same. Only `matchMaps` makes one. */
export interface MatchedMaps {
	readonly lagDays: number;
	readonly bins: number;
	readonly units: number;
	readonly earlierHz: Float64Array;
	readonly laterHz: Float64Array;
	readonly earlierMeanHz: Float64Array;
	readonly laterMeanHz: Float64Array;
	readonly bundle: Int32Array;
	/** Chance that each pair is one cell. */
	readonly probability: Float64Array;
	/** Row of each unit in the maps of its day. */
	readonly earlierRow: Int32Array;
	readonly laterRow: Int32Array;
}

/**
 * Brings the units of two days into one order. Units that are not on both days, or are less sure to
 * be one cell than `leastProbability`, are left out: what is matched and what is not are never mixed.
 * @param probability chance that a lineage is one cell on both days, see `lineageProbability`
 * @returns units by ascending lineage, whatever their order on either day
 * @throws RangeError bins differ, the later day is not later, or a lineage stands twice on a day
 */
export function matchMaps(
	earlier: DayMaps,
	later: DayMaps,
	probability: (lineage: number) => number,
	leastProbability = 0
): MatchedMaps {
	if (earlier.bins !== later.bins) {
		throw new RangeError(`bins differ: ${earlier.bins} and ${later.bins}`);
	}
	if (!(later.day > earlier.day)) throw new RangeError('the later day must be later');
	const rowOf = rowsOf(earlier);
	const pairs = [...rowsOf(later)]
		.flatMap(([lineage, laterRow]) => {
			const earlierRow = rowOf.get(lineage);
			const p = probability(lineage);
			return earlierRow === undefined || !(p >= leastProbability)
				? []
				: [{ lineage, earlierRow, laterRow, p }];
		})
		.sort((a, b) => a.lineage - b.lineage);
	const earlierRow = Int32Array.from(pairs, (pair) => pair.earlierRow);
	const laterRow = Int32Array.from(pairs, (pair) => pair.laterRow);
	return {
		lagDays: later.day - earlier.day,
		bins: later.bins,
		units: pairs.length,
		earlierHz: rowsInOrder(earlier, earlierRow),
		laterHz: rowsInOrder(later, laterRow),
		earlierMeanHz: Float64Array.from(earlierRow, (row) => earlier.meanHz[row]),
		laterMeanHz: Float64Array.from(laterRow, (row) => later.meanHz[row]),
		bundle: Int32Array.from(laterRow, (row) => later.bundle[row]),
		probability: Float64Array.from(pairs, ({ p }) => p),
		earlierRow,
		laterRow
	};
}

function rowsOf({ lineage, day }: DayMaps): Map<number, number> {
	const rows = new Map<number, number>();
	lineage.forEach((one, row) => {
		if (rows.has(one)) throw new RangeError(`lineage ${one} stands twice on day ${day}`);
		rows.set(one, row);
	});
	return rows;
}

function rowsInOrder({ ratesHz, bins }: DayMaps, rows: Int32Array): Float64Array {
	const out = new Float64Array(rows.length * bins);
	rows.forEach((row, u) => out.set(ratesHz.subarray(row * bins, (row + 1) * bins), u * bins));
	return out;
}

/** Map of one unit, a view. */
export function rowAt(ratesHz: Float64Array, bins: number, row: number): Float64Array {
	return ratesHz.subarray(row * bins, (row + 1) * bins);
}
