/** What an animal did in a stretch of a session. */
export const EPOCH_KINDS = ['run', 'rest', 'sleep', 'stimulation', 'excluded'] as const;
export type EpochKind = (typeof EPOCH_KINDS)[number];

/** A named stretch of a session on the recorder's clock; it holds startS and ends before stopS. */
export interface Epoch {
	readonly name: string;
	readonly kind: EpochKind;
	readonly startS: number;
	readonly stopS: number;
}

/** A stretch of time, [startS, stopS). */
export interface Stretch {
	readonly startS: number;
	readonly stopS: number;
}

/**
 * The stretches that maps and decoding use: the run epochs (all time when there is none), without
 * what is marked excluded or stimulation. In order of time; overlapping run epochs are joined.
 */
export function usedStretches(epochs: readonly Epoch[]): Stretch[] {
	const runs = epochs.filter(({ kind }) => kind === 'run');
	const cuts = epochs.filter(({ kind }) => kind === 'excluded' || kind === 'stimulation');
	const whole: Stretch[] =
		runs.length > 0 ? joined(runs) : [{ startS: -Infinity, stopS: Infinity }];
	return cuts.reduce((kept, cut) => kept.flatMap((stretch) => without(stretch, cut)), whole);
}

function joined(stretches: readonly Stretch[]): Stretch[] {
	const out: Stretch[] = [];
	for (const { startS, stopS } of [...stretches].sort((a, b) => a.startS - b.startS)) {
		const last = out.at(-1);
		if (last && startS < last.stopS) {
			out[out.length - 1] = { startS: last.startS, stopS: Math.max(last.stopS, stopS) };
		} else {
			out.push({ startS, stopS });
		}
	}
	return out;
}

function without(stretch: Stretch, cut: Stretch): Stretch[] {
	if (cut.stopS <= stretch.startS || cut.startS >= stretch.stopS) return [stretch];
	const left = { startS: stretch.startS, stopS: cut.startS };
	const right = { startS: cut.stopS, stopS: stretch.stopS };
	return [left, right].filter(({ startS, stopS }) => startS < stopS);
}

/**
 * The stretch that holds each sample, −1 for none.
 * @param tS ascending
 */
export function stretchOfSamples(tS: Float64Array, stretches: readonly Stretch[]): Int32Array {
	const out = new Int32Array(tS.length).fill(-1);
	let k = 0;
	for (let i = 0; i < tS.length; i++) {
		while (k < stretches.length && tS[i] >= stretches[k].stopS) k++;
		if (k < stretches.length && tS[i] >= stretches[k].startS) out[i] = k;
	}
	return out;
}
