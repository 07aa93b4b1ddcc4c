/**
 * Several typed arrays in one run of bytes, for what pages draw: four letters, the length of an index
 * (uint32), the index as JSON, then each array at a multiple of eight bytes. Little-endian.
 */
const MAGIC = 'QTA1';
const HEAD_BYTES = 8;

const TYPES = {
	u8: Uint8Array,
	i8: Int8Array,
	i32: Int32Array,
	f32: Float32Array,
	f64: Float64Array
} as const;

type TypeName = keyof typeof TYPES;
export type NamedArray = Uint8Array | Int8Array | Int32Array | Float32Array | Float64Array;

interface Entry {
	name: string;
	type: TypeName;
	length: number;
	/** Bytes from the end of the index. */
	at: number;
}

const padded = (bytes: number) => Math.ceil(bytes / 8) * 8;

function typeOf(array: NamedArray): TypeName {
	for (const name of Object.keys(TYPES) as TypeName[]) {
		if (array instanceof TYPES[name]) return name;
	}
	throw new TypeError('an array of this type cannot be packed');
}

/** Packs arrays under their names. */
export function packArrays(arrays: Record<string, NamedArray>): Uint8Array<ArrayBuffer> {
	let bytes = 0;
	const index: Entry[] = Object.entries(arrays).map(([name, array]) => {
		const at = bytes;
		bytes += padded(array.byteLength);
		return { name, type: typeOf(array), length: array.length, at };
	});
	const text = new TextEncoder().encode(JSON.stringify(index));
	const start = HEAD_BYTES + padded(text.length);
	const out = new Uint8Array(start + bytes);
	out.set(new TextEncoder().encode(MAGIC));
	new DataView(out.buffer).setUint32(4, padded(text.length), true);
	out.fill(32, HEAD_BYTES, start);
	out.set(text, HEAD_BYTES);
	for (const { name, at } of index) {
		const { buffer, byteOffset, byteLength } = arrays[name];
		out.set(new Uint8Array(buffer, byteOffset, byteLength), start + at);
	}
	return out;
}

/**
 * Views on packed arrays, nothing copied.
 * @throws RangeError bytes that `packArrays` did not write
 */
export function unpackArrays(buffer: ArrayBuffer): Map<string, NamedArray> {
	const head = new Uint8Array(buffer, 0, Math.min(HEAD_BYTES, buffer.byteLength));
	if (new TextDecoder().decode(head.subarray(0, 4)) !== MAGIC) {
		throw new RangeError('these bytes hold no packed arrays');
	}
	const start = HEAD_BYTES + new DataView(buffer).getUint32(4, true);
	const text = new TextDecoder().decode(new Uint8Array(buffer, HEAD_BYTES, start - HEAD_BYTES));
	const index: Entry[] = JSON.parse(text);
	return new Map(
		index.map(({ name, type, length, at }) => [name, new TYPES[type](buffer, start + at, length)])
	);
}
