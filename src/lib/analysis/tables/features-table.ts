import type { Features } from '../quality/covariance';
import { MOST_FEATURES } from './fields';
import type { LabelTable } from './label-table';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

/** Features of every spike of one bundle, noise included. */
export interface BundleFeatures extends Features {
	readonly bundle: string;
	/** Labels of its units. */
	readonly units: readonly string[];
	/** Index in `units` of each spike, −1 for spikes that belong to none. */
	readonly unitOf: Int32Array;
}

/**
 * Features from a table that has been read: one row a spike, f1 … fn without a gap in the numbers.
 * Times are read and checked, but isolation does not need them.
 * @throws TableError a feature number is left out
 * Cost: O(spikes · features).
 */
export function featuresOf(reader: TableReader): BundleFeatures[] {
	const columns = featureColumns(reader);
	const dimensions = columns.length;
	const bundles = labelled(reader, 'bundle');
	const units = labelled(reader, 'unit');
	const counts = new Int32Array(bundles.names.length);
	for (let row = 0; row < reader.rows; row++) counts[bundles.ids[row]]++;
	const gathered = bundles.names.map((bundle, b) => ({
		bundle,
		units: [] as string[],
		unitOf: new Int32Array(counts[b]),
		values: new Float64Array(counts[b] * dimensions),
		dimensions
	}));
	const filled = new Int32Array(bundles.names.length);
	const numbers = bundles.names.map(() => new Map<number, number>());
	for (let row = 0; row < reader.rows; row++) {
		const b = bundles.ids[row];
		const { units: labels, unitOf, values } = gathered[b];
		const at = filled[b]++;
		const id = units.ids[row];
		let number = units.names[id] === '' ? -1 : numbers[b].get(id);
		if (number === undefined) {
			number = labels.push(units.names[id]) - 1;
			numbers[b].set(id, number);
		}
		unitOf[at] = number;
		for (let f = 0; f < dimensions; f++) values[at * dimensions + f] = columns[f][row];
	}
	return gathered;
}

/** Columns f1 … fn; what stands behind a hole in the numbers is no accident to pass over. */
function featureColumns(reader: TableReader): Float64Array[] {
	const columns: Float64Array[] = [];
	for (let k = 1; k <= MOST_FEATURES; k++) {
		const values = reader.column(`f${k}`)?.numbers?.values;
		if (!values) continue;
		if (columns.length !== k - 1) {
			const reason = `there is f${k} and no f${columns.length + 1}; features are numbered without a gap`;
			throw new TableError('features', 'header', reason, 1, `f${k}`);
		}
		columns.push(values);
	}
	return columns;
}

function labelled(
	reader: TableReader,
	role: string
): { ids: Int32Array; names: LabelTable['labels'] } {
	const column = reader.column(role);
	return {
		ids: column?.ids?.values ?? new Int32Array(reader.rows),
		names: column?.labels?.labels ?? ['']
	};
}
