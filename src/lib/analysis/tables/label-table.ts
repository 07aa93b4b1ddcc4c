const SLOTS = 1 << 16;

/** Most different labels one column may hold; more is surely the wrong column. */
export const MOST_LABELS = 20_000;

/**
 * Numbers for labels, given in order of first sight and straight from their bytes: no string is made
 * for a label that is known. Open addressing, at most 20,000 labels in 65,536 slots.
 */
export class LabelTable {
	/** The labels by number. */
	readonly labels: string[] = [];
	private readonly bytes: Uint8Array[] = [];
	private readonly slots = new Int32Array(SLOTS).fill(-1);
	private readonly decoder = new TextDecoder();

	/**
	 * Number of the label in from … to − 1, −1 when there is no room for another label.
	 */
	intern(source: Uint8Array, from: number, to: number): number {
		let hash = 0;
		for (let i = from; i < to; i++) hash = (Math.imul(hash, 31) + source[i]) | 0;
		let slot = (hash ^ (hash >>> 15)) & (SLOTS - 1);
		for (;;) {
			const known = this.slots[slot];
			if (known < 0) break;
			if (isSame(this.bytes[known], source, from, to)) return known;
			slot = (slot + 1) & (SLOTS - 1);
		}
		if (this.labels.length >= MOST_LABELS) return -1;
		this.slots[slot] = this.labels.length;
		this.bytes.push(source.slice(from, to));
		return this.labels.push(this.decoder.decode(source.subarray(from, to))) - 1;
	}
}

function isSame(label: Uint8Array, source: Uint8Array, from: number, to: number): boolean {
	if (label.length !== to - from) return false;
	for (let i = 0; i < label.length; i++) if (label[i] !== source[from + i]) return false;
	return true;
}
