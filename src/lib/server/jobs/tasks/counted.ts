/** Passes chunks on and tells the sum of their lengths. */
export async function* counted(
	chunks: AsyncIterable<Uint8Array>,
	tell: (bytes: number) => void
): AsyncGenerator<Uint8Array> {
	let bytes = 0;
	for await (const chunk of chunks) {
		yield chunk;
		bytes += chunk.length;
		tell(bytes);
	}
}
