import { describe, expect, it } from 'vitest';
import { parseNpy } from './npy';
import { readPosition, readSpikes } from './read-session-tables';
import { spikesFromNpyPair } from './spike-table';
import { TableError } from './table-error';

/** Writes a .npy file by its published layout (NEP 1). */
function npy(
	descr: string,
	shape: readonly number[],
	write: (view: DataView, at: number, value: number) => void,
	values: readonly number[],
	{ version = 1, isColumnMajor = false } = {}
): Uint8Array {
	const size = Number(descr.slice(-1));
	const comma = shape.length === 1 ? ',' : '';
	const order = isColumnMajor ? 'True' : 'False';
	const text = `{'descr': '${descr}', 'fortran_order': ${order}, 'shape': (${shape.join(', ')}${comma}), }\n`;
	const lengthBytes = version === 1 ? 2 : 4;
	const out = new Uint8Array(8 + lengthBytes + text.length + size * values.length);
	const view = new DataView(out.buffer);
	out.set([0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59, version, 0]);
	if (version === 1) view.setUint16(8, text.length, true);
	else view.setUint32(8, text.length, true);
	out.set(new TextEncoder().encode(text), 8 + lengthBytes);
	values.forEach((value, i) => write(view, 8 + lengthBytes + text.length + i * size, value));
	return out;
}

const f8 = (view: DataView, at: number, value: number) => view.setFloat64(at, value, true);

describe('parseNpy', () => {
	it.each([
		['<f8', f8],
		['>f8', (v: DataView, at: number, x: number) => v.setFloat64(at, x)],
		['<f4', (v: DataView, at: number, x: number) => v.setFloat32(at, x, true)],
		['<i8', (v: DataView, at: number, x: number) => v.setBigInt64(at, BigInt(x), true)],
		['>i4', (v: DataView, at: number, x: number) => v.setInt32(at, x)],
		['<u2', (v: DataView, at: number, x: number) => v.setUint16(at, x, true)],
		['|u1', (v: DataView, at: number, x: number) => v.setUint8(at, x)]
	] as const)('reads %s', (descr, write) => {
		const array = parseNpy('spikes', npy(descr, [3], write, [1, 2, 250]));
		expect(array).toEqual({ shape: [3], data: Float64Array.of(1, 2, 250) });
	});

	it.each([1, 2, 3])('reads format version %d', (version) => {
		expect([...parseNpy('spikes', npy('<f8', [1, 2], f8, [4, 5], { version })).data]).toEqual([
			4, 5
		]);
	});

	it('turns column-major arrays round', () => {
		const array = parseNpy(
			'spikes',
			npy('<f8', [2, 3], f8, [1, 4, 2, 5, 3, 6], { isColumnMajor: true })
		);
		expect([...array.data]).toEqual([1, 2, 3, 4, 5, 6]);
	});

	it('refuses text, records and files that are cut short', () => {
		const code = (bytes: Uint8Array) => {
			try {
				parseNpy('spikes', bytes);
			} catch (error) {
				return error instanceof TableError ? `${error.code}: ${error.reason}` : error;
			}
			return 'read';
		};
		expect(code(npy('<U8', [1], f8, [1]))).toContain('not-a-table');
		expect(code(npy('<f8', [4, 1, 1], f8, [1, 2, 3, 4]))).toContain('axes');
		expect(code(npy('<f8', [4], f8, [1, 2, 3]))).toBe(
			'truncated: the file is cut short: 3 of 4 numbers'
		);
	});
});

describe('arrays in place of tables', () => {
	it('hold t, x and y row by row', async () => {
		const path = await readPosition([npy('<f8', [2, 3], f8, [0, 1, 2, 0.1, 3, 4])]);
		expect([...path.tS, ...path.xCm, ...(path.yCm ?? [])]).toEqual([0, 0.1, 1, 3, 2, 4]);
		await expect(readPosition([npy('<f8', [2], f8, [0, 1])])).rejects.toThrow('rows must be t_s');
		await expect(readPosition([npy('<f8', [1, 2], f8, [0, NaN])])).rejects.toMatchObject({
			code: 'missing-value',
			row: 1,
			column: 'x_cm'
		});
	});

	it('hold unit and time, together or in two files', async () => {
		const bytes = npy('<f8', [3, 2], f8, [2, 0.5, 1, 3, 2, 0.25]);
		// A file may come in the smallest of pieces.
		const { units } = await readSpikes([bytes.slice(0, 3), bytes.slice(3)]);
		expect(units.map(({ unit, timesS }) => [unit, [...timesS]])).toEqual([
			['1', [3]],
			['2', [0.25, 0.5]]
		]);
		const times = npy('<f8', [2], f8, [1, 2]);
		const labels = npy('|u1', [2], (v, at, x) => v.setUint8(at, x), [7, 7]);
		expect(spikesFromNpyPair(times, labels).units[0].unit).toBe('7');
		expect(() => spikesFromNpyPair(times, npy('<f8', [1], f8, [1]))).toThrow('as many');
	});
});
