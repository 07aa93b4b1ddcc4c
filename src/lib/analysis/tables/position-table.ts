import type { PositionInput } from '../session/input';
import { npyColumn, parseNpy } from './npy';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

/** A path as read from a file. Rows count as in the file: the first sample is row `firstRow`. */
export interface PositionTable extends PositionInput {
	/** Degrees, NaN where unknown; null without such a column. */
	readonly headDeg: Float64Array | null;
}

/** Farther than this (100 m) is no place a tracked animal can be. */
const FARTHEST_CM = 10_000;

/**
 * Positions from a table that has been read.
 * @param pxPerCm scale for columns in pixels
 * @throws TableError pixels without a scale, x and y in different units, or an impossible place
 */
export function positionsOf(reader: TableReader, pxPerCm?: number): PositionTable {
	const take = (role: string) => {
		const column = reader.column(role);
		const values = column?.numbers?.first(reader.rows) ?? null;
		if (!column || !values || !column.spec.field.endsWith('_px')) return values;
		if (pxPerCm === undefined) {
			const reason = 'positions are in pixels; give the scale in pixels per cm';
			throw new TableError('position', 'header', reason, 1, column.spec.field);
		}
		return values.map((value) => value / pxPerCm);
	};
	const isPx = (role: string) => reader.column(role)?.spec.field.endsWith('_px');
	if (reader.column('y') && isPx('x') !== isPx('y')) {
		throw new TableError('position', 'header', 'one coordinate is in pixels, the other is not', 1);
	}
	const tS = take('t') ?? new Float64Array(0);
	const xCm = take('x') ?? new Float64Array(0);
	return checked({ tS, xCm, yCm: take('y'), headDeg: take('head') }, 2);
}

/**
 * Positions from a `.npy` array with rows t_s, x_cm or t_s, x_cm, y_cm.
 * @throws TableError another shape, a value that is not finite, or an impossible place
 */
export function positionsFromNpy(bytes: Uint8Array): PositionTable {
	const array = parseNpy('position', bytes);
	const columns = array.shape[1] ?? 1;
	if (columns !== 2 && columns !== 3) {
		const reason = `rows must be t_s, x_cm or t_s, x_cm, y_cm; these have ${columns} numbers`;
		throw new TableError('position', 'header', reason);
	}
	const [tS, xCm, yCm = null] = Array.from({ length: columns }, (_, c) => npyColumn(array, c));
	return checked({ tS, xCm, yCm, headDeg: null }, 1);
}

function checked(path: Omit<PositionTable, 'firstRow'>, firstRow: number): PositionTable {
	const columns: [string, Float64Array | null, number][] = [
		['t_s', path.tS, Infinity],
		['x_cm', path.xCm, FARTHEST_CM],
		['y_cm', path.yCm, FARTHEST_CM]
	];
	for (const [column, values, most] of columns) {
		if (!values) continue;
		const wrong = values.findIndex(
			(value) => !(Math.abs(value) <= most) || !Number.isFinite(value)
		);
		if (wrong < 0) continue;
		const value = values[wrong];
		if (!Number.isFinite(value)) {
			const reason = `${value} is no value; leave such rows out`;
			throw new TableError('position', 'missing-value', reason, wrong + firstRow, column);
		}
		const reason = `${value} cm is farther than 100 m from the origin; check the unit and the tracker`;
		throw new TableError('position', 'absurd-position', reason, wrong + firstRow, column);
	}
	return { ...path, firstRow };
}
