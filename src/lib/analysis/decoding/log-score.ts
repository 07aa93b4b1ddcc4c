/** How much posterior stood where the animal was. */
export interface LogScore {
	/** Mean log₂ posterior at the true bin, bits; NaN when nothing could be scored. */
	readonly meanBits: number;
	readonly scored: number;
	/** Windows whose true bin had prior 0 (log score −∞): unvisited in the training data. */
	readonly unscorable: number;
}

/**
 * Mean log score, the most sensitive figure for comparing days. Windows that cannot be scored are
 * left out of it and counted, never dropped silently; their distance errors stay in the others.
 * @param log2AtTrue log₂ posterior at the true bin, NaN or −∞ where it has prior 0
 */
export function logScore(log2AtTrue: Float64Array): LogScore {
	let sum = 0;
	let scored = 0;
	for (const bits of log2AtTrue) {
		if (!Number.isFinite(bits)) continue;
		sum += bits;
		scored++;
	}
	const meanBits = scored > 0 ? sum / scored : NaN;
	return { meanBits, scored, unscorable: log2AtTrue.length - scored };
}
