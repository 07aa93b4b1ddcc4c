import { describe, expect, it } from 'vitest';
import { packArrays, unpackArrays } from './named-arrays';

describe('packed arrays', () => {
	it('come back under their names, of their types, value for value', () => {
		const arrays = {
			odd: Uint8Array.of(1, 2, 3),
			timesS: Float64Array.of(0.1, NaN, -0),
			bin: Int32Array.of(-1, 7),
			placeCm: Float32Array.of(1.5),
			direction: Int8Array.of(-1, 0, 1)
		};
		const back = unpackArrays(packArrays(arrays).buffer);
		expect(Object.fromEntries(back)).toEqual(arrays);
	});

	it('may be empty', () => {
		expect(unpackArrays(packArrays({ none: new Float64Array() }).buffer).get('none')).toHaveLength(
			0
		);
		expect(unpackArrays(packArrays({}).buffer).size).toBe(0);
	});

	it('take a view of a larger buffer', () => {
		const view = new Float64Array([1, 2, 3, 4]).subarray(1, 3);
		expect(unpackArrays(packArrays({ view }).buffer).get('view')).toEqual(Float64Array.of(2, 3));
	});

	it('are told from other bytes', () => {
		expect(() => unpackArrays(new TextEncoder().encode('{"a":1}    ').buffer)).toThrow(RangeError);
		expect(() => unpackArrays(new ArrayBuffer(0))).toThrow(RangeError);
	});
});
