import { byLabel, type SpikeTable } from './spike-table';

/**
 * One table from parts that were read apart, so that a large file can be read by several threads.
 * Units are the same where label and bundle are.
 */
export function joinSpikeTables(parts: readonly SpikeTable[]): SpikeTable {
	const times = new Map<string, { unit: string; bundle: string | null; parts: Float64Array[] }>();
	for (const { unit, bundle, timesS } of parts.flatMap(({ units }) => units)) {
		const key = JSON.stringify([unit, bundle]);
		const known = times.get(key);
		if (known) known.parts.push(timesS);
		else times.set(key, { unit, bundle, parts: [timesS] });
	}
	const units = [...times.values()].map(({ unit, bundle, parts: own }) => {
		const timesS = new Float64Array(own.reduce((sum, { length }) => sum + length, 0));
		let at = 0;
		let isSorted = true;
		for (const part of own) {
			if (at > 0 && part[0] < timesS[at - 1]) isSorted = false;
			timesS.set(part, at);
			at += part.length;
		}
		if (!isSorted) timesS.sort();
		return { unit, bundle, timesS };
	});
	return {
		units: units.sort(byLabel),
		spikes: parts.reduce((sum, { spikes }) => sum + spikes, 0),
		warnings: [...new Set(parts.flatMap(({ warnings }) => warnings))]
	};
}
