import type { UnitInput } from '../session/input';
import { npyColumn, parseNpy } from './npy';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

/** Spikes as read from a file, by unit. */
export interface SpikeTable {
	/** Ordered by label, numbers by value; times ascend. */
	readonly units: readonly UnitInput[];
	readonly spikes: number;
	readonly warnings: readonly string[];
}

/** Spikes from a table that has been read. Rows may come in any order. */
export function spikesOf(reader: TableReader): SpikeTable {
	const unit = reader.column('unit');
	const bundle = reader.column('bundle');
	const timesS = reader.column('t')?.numbers?.values.subarray(0, reader.rows);
	if (!unit?.ids || !unit.labels || !timesS) {
		throw new TableError('spikes', 'header', 'the columns unit and t_s were not read', 1);
	}
	return grouped(
		timesS,
		unit.ids.values,
		unit.labels.labels,
		bundle?.ids?.values ?? null,
		bundle?.labels?.labels ?? []
	);
}

/**
 * Spikes from a `.npy` array with rows unit, t_s.
 * @throws TableError another shape, or a time that is not finite
 */
export function spikesFromNpy(bytes: Uint8Array): SpikeTable {
	const array = parseNpy('spikes', bytes);
	if (array.shape[1] !== 2) {
		const reason = `rows must be unit, t_s; these have ${array.shape[1] ?? 1} numbers`;
		throw new TableError('spikes', 'header', reason);
	}
	return fromColumns(npyColumn(array, 0), npyColumn(array, 1));
}

/**
 * Spikes from two `.npy` arrays of the same length, times in seconds and unit labels.
 * @throws TableError lengths differ, or a time that is not finite
 */
export function spikesFromNpyPair(times: Uint8Array, labels: Uint8Array): SpikeTable {
	const { data: timesS } = parseNpy('spikes', times);
	const { data: units } = parseNpy('spikes', labels);
	if (timesS.length !== units.length) {
		const reason = `${timesS.length} times and ${units.length} labels; they must be as many`;
		throw new TableError('spikes', 'ragged', reason);
	}
	return fromColumns(units, timesS);
}

function fromColumns(units: Float64Array, timesS: Float64Array): SpikeTable {
	const wrong = timesS.findIndex((time) => !Number.isFinite(time));
	if (wrong >= 0) {
		const reason = `${timesS[wrong]} is no value; leave such rows out`;
		throw new TableError('spikes', 'missing-value', reason, wrong + 1, 't_s');
	}
	const known = new Map<number, number>();
	const ids = Int32Array.from(units, (unit) => {
		const id = known.get(unit) ?? known.size;
		known.set(unit, id);
		return id;
	});
	return grouped(timesS, ids, [...known.keys()].map(String), null, []);
}

/**
 * A unit label that occurs in several bundles means as many units: many labs number per bundle.
 * Tables of 100 MB pass here inside a server: `unit` is used up (its numbers become those of unit and
 * bundle together), and the units are views of one array.
 */
function grouped(
	timesS: Float64Array,
	unit: Int32Array,
	unitLabels: readonly string[],
	bundle: Int32Array | null,
	bundleLabels: readonly string[]
): SpikeTable {
	const perUnit = Math.max(1, bundleLabels.length);
	const group = unit;
	if (bundle) {
		for (let row = 0; row < timesS.length; row++) group[row] = group[row] * perUnit + bundle[row];
	}
	const first = new Int32Array(unitLabels.length * perUnit + 1);
	for (let row = 0; row < timesS.length; row++) first[group[row] + 1]++;
	for (let g = 1; g < first.length; g++) first[g] += first[g - 1];
	const next = first.slice();
	const flat = new Float64Array(timesS.length);
	for (let row = 0; row < timesS.length; row++) flat[next[group[row]]++] = timesS[row];
	const sorted = Array.from(first.subarray(1), (end, g) => flat.subarray(first[g], end));
	const units = sorted.flatMap((times, g): UnitInput[] => {
		if (times.length === 0) return [];
		if (!isSorted(times)) times.sort();
		const name = bundle ? bundleLabels[g % perUnit] : '';
		return [{ unit: unitLabels[Math.floor(g / perUnit)], bundle: name || null, timesS: times }];
	});
	const shared = units.filter(({ unit: label }, i) => units[i - 1]?.unit === label);
	const warnings = shared.length
		? [
				`The same unit label in more than one bundle is taken for different units: ${[...new Set(shared.map(({ unit: label }) => label))].join(', ')}.`
			]
		: [];
	return { units: units.sort(byLabel), spikes: timesS.length, warnings };
}

function isSorted(times: Float64Array): boolean {
	for (let i = 1; i < times.length; i++) if (times[i] < times[i - 1]) return false;
	return true;
}

/** Made once: `localeCompare` with options makes one for every pair. */
const ORDER = new Intl.Collator('en', { numeric: true, sensitivity: 'variant' });

/** Order of units: by label, numbers by value, then by bundle. */
export function byLabel(a: UnitInput, b: UnitInput): number {
	return ORDER.compare(a.unit, b.unit) || ORDER.compare(a.bundle ?? '', b.bundle ?? '');
}
