import { TableError, type TableKind } from './table-error';

/** A NumPy array of numbers, row-major. */
export interface NpyArray {
	readonly shape: readonly number[];
	readonly data: Float64Array;
}

const READERS: Readonly<Record<string, (view: DataView, at: number, little: boolean) => number>> = {
	f4: (view, at, little) => view.getFloat32(at, little),
	f8: (view, at, little) => view.getFloat64(at, little),
	i1: (view, at) => view.getInt8(at),
	i2: (view, at, little) => view.getInt16(at, little),
	i4: (view, at, little) => view.getInt32(at, little),
	i8: (view, at, little) => Number(view.getBigInt64(at, little)),
	u1: (view, at) => view.getUint8(at),
	u2: (view, at, little) => view.getUint16(at, little),
	u4: (view, at, little) => view.getUint32(at, little),
	u8: (view, at, little) => Number(view.getBigUint64(at, little))
};

/**
 * Reads a `.npy` file (format versions 1 to 3) of whole numbers or floats, either byte order.
 * 64-bit whole numbers become the nearest float64.
 * @throws TableError not a .npy file, another kind of element, more than two axes, or cut short
 */
export function parseNpy(table: TableKind, bytes: Uint8Array): NpyArray {
	const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
	const isLong = bytes[6] >= 2;
	const start = isLong ? 12 : 10;
	if (bytes.length < start || bytes[6] < 1 || bytes[6] > 3) {
		throw new TableError(table, 'not-a-table', 'this is no .npy file of version 1 to 3');
	}
	const dataAt = start + (isLong ? view.getUint32(8, true) : view.getUint16(8, true));
	const header = new TextDecoder().decode(bytes.subarray(start, Math.min(dataAt, bytes.length)));
	const order = /'descr':\s*'([<>|=])([fiu]\d)'/.exec(header);
	const read = order && READERS[order[2]];
	const shapeText = /'shape':\s*\(([\d,\s]*)\)/.exec(header);
	if (!order || !read || !shapeText) {
		throw new TableError(table, 'not-a-table', 'the array must hold whole numbers or floats');
	}
	const shape = shapeText[1].split(',').flatMap((part) => (part.trim() ? [Number(part)] : []));
	if (shape.length === 0 || shape.length > 2) {
		throw new TableError(
			table,
			'not-a-table',
			`the array has ${shape.length} axes, not one or two`
		);
	}
	const size = Number(order[2][1]);
	const count = shape.reduce((product, length) => product * length, 1);
	if (bytes.length < dataAt + count * size) {
		const there = Math.max(0, Math.floor((bytes.length - dataAt) / size));
		throw new TableError(table, 'truncated', `the file is cut short: ${there} of ${count} numbers`);
	}
	const isColumnMajor = /'fortran_order':\s*True/.test(header);
	const little = order[1] !== '>';
	const [rows, columns = 1] = shape;
	const data = new Float64Array(count);
	for (let k = 0; k < count; k++) {
		const from = isColumnMajor ? (k % columns) * rows + Math.floor(k / columns) : k;
		data[k] = read(view, dataAt + from * size, little);
	}
	return { shape, data };
}

/** One column of an array with two axes, or the whole of an array with one. */
export function npyColumn({ shape, data }: NpyArray, column: number): Float64Array {
	const [rows, columns = 1] = shape;
	return Float64Array.from({ length: rows }, (_, row) => data[row * columns + column]);
}
