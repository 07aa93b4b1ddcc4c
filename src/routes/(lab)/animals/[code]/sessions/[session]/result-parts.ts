import { unpackArrays, type NamedArray } from '$lib/schemas/named-arrays';

const MOST_KEPT = 8;
const kept = new Map<string, Promise<Map<string, NamedArray>>>();

/** Arrays of a result by their address; several figures of a page share one fetch. */
export function fetchPart(address: string): Promise<Map<string, NamedArray>> {
	const known = kept.get(address);
	if (known) return known;
	const coming = fetchNew(address);
	kept.set(address, coming);
	coming.catch(() => kept.delete(address));
	for (const oldest of kept.keys()) {
		if (kept.size <= MOST_KEPT) break;
		kept.delete(oldest);
	}
	return coming;
}

async function fetchNew(address: string): Promise<Map<string, NamedArray>> {
	const answer = await fetch(address);
	if (!answer.ok) throw new Error(`The server answered with status ${answer.status}`);
	return unpackArrays(await answer.arrayBuffer());
}

/** @throws RangeError when a result has no such array */
export function arrayOf(arrays: Map<string, NamedArray>, name: string): NamedArray {
	const found = arrays.get(name);
	if (!found) throw new RangeError(`the result has no ${name}`);
	return found;
}
