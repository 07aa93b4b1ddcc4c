interface Signature {
	readonly name: string;
	readonly bytes: readonly number[];
}

const SIGNATURES: readonly Signature[] = [
	{ name: 'a NumPy array', bytes: [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59] },
	{ name: 'an HDF5 or NWB file', bytes: [0x89, 0x48, 0x44, 0x46, 0x0d, 0x0a, 0x1a, 0x0a] },
	{ name: 'a Parquet file', bytes: [0x50, 0x41, 0x52, 0x31] },
	{ name: 'a zip archive or spreadsheet file', bytes: [0x50, 0x4b, 0x03, 0x04] },
	{ name: 'an old spreadsheet file', bytes: [0xd0, 0xcf, 0x11, 0xe0] },
	{ name: 'a gzip archive', bytes: [0x1f, 0x8b] },
	{ name: 'a PNG image', bytes: [0x89, 0x50, 0x4e, 0x47] },
	{ name: 'a JPEG image', bytes: [0xff, 0xd8, 0xff] },
	{ name: 'a TIFF image', bytes: [0x49, 0x49, 0x2a, 0x00] },
	{ name: 'a TIFF image', bytes: [0x4d, 0x4d, 0x00, 0x2a] },
	{ name: 'a PDF document', bytes: [0x25, 0x50, 0x44, 0x46] },
	{ name: 'text in UTF-16; save it as UTF-8', bytes: [0xff, 0xfe] },
	{ name: 'text in UTF-16; save it as UTF-8', bytes: [0xfe, 0xff] }
];

/** Bytes needed to tell what a file is. */
export const MAGIC_LENGTH = 8;

/**
 * What a file is, whatever its name says: a phrase for people, or null when it may be text.
 * @param head the first bytes of the file, 8 or more when it has them
 */
export function recognise(head: Uint8Array): string | null {
	const found = SIGNATURES.find(({ bytes }) => bytes.every((byte, i) => head[i] === byte));
	if (found) return found.name;
	return head.subarray(0, 4096).includes(0) ? 'binary data' : null;
}

/** True for the first bytes of a NumPy array. */
export function isNpy(head: Uint8Array): boolean {
	return recognise(head) === 'a NumPy array';
}
