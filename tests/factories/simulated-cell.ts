import { normalQuantile } from '../../src/lib/analysis/statistics/normal';
import type { Random } from '../../src/lib/analysis/random/seeded';

/** One draw of the normal law with mean 0 and σ 1. */
export function normal(random: Random): number {
	return normalQuantile(Math.max(1e-12, random.next()));
}

/** A nerve cell near a tetrode. Places in µm from its middle; times of the waveform in ms. */
export interface Cell {
	readonly id: number;
	readonly isInterneuron: boolean;
	readonly placeUm: [number, number, number];
	/** Trough at no distance, µV. */
	readonly sourceUv: number;
	readonly troughSdMs: number;
	readonly widthMs: number;
	readonly afterShare: number;
	readonly afterSdMs: number;
	readonly beforeShare: number;
	/** What differs between channels, from the way current runs through the cell. */
	readonly delayMs: readonly number[];
	readonly afterOfChannel: readonly number[];
	readonly rateHz: number;
	/** Share of events that are bursts, and the interval within one. */
	readonly burstShare: number;
	readonly burstIntervalMs: number;
	readonly refractoryMs: number;
	/** Depth of the modulation by the 8 Hz rhythm, 0 to 1, and its phase. */
	readonly rhythm: number;
	/** Share of events inside place fields, where a tenth of the time is spent. */
	readonly inFields: number;
}

const within = (random: Random, low: number, high: number) => low + (high - low) * random.next();

/** A cell at a random place 15 to 90 µm from the tetrode; one in seven is an interneuron. */
export function simulatedCell(id: number, random: Random): Cell {
	const isInterneuron = random.next() < 1 / 7;
	const direction = [normal(random), normal(random), normal(random)];
	const reach = within(random, 15, 90) / Math.hypot(...direction);
	return {
		id,
		isInterneuron,
		placeUm: [direction[0] * reach, direction[1] * reach, direction[2] * reach],
		sourceUv: (isInterneuron ? 280 : 420) * Math.exp(0.35 * normal(random)),
		troughSdMs: isInterneuron ? within(random, 0.05, 0.08) : within(random, 0.075, 0.12),
		widthMs: isInterneuron ? within(random, 0.18, 0.3) : within(random, 0.38, 0.62),
		afterShare: within(random, 0.2, 0.55),
		afterSdMs: isInterneuron ? within(random, 0.08, 0.14) : within(random, 0.13, 0.25),
		beforeShare: within(random, 0, 0.2),
		delayMs: Array.from({ length: 4 }, () => 0.02 * normal(random)),
		afterOfChannel: Array.from({ length: 4 }, () => Math.exp(0.15 * normal(random))),
		rateHz: isInterneuron ? within(random, 8, 25) : Math.exp(within(random, -1.2, 1.1)),
		burstShare: isInterneuron ? 0.02 : within(random, 0.05, 0.55),
		burstIntervalMs: within(random, 3.5, 8),
		refractoryMs: isInterneuron ? within(random, 2.5, 6) : within(random, 2.2, 3.2),
		rhythm: within(random, 0.2, 0.8),
		inFields: within(random, 0.5, 0.9)
	};
}

/** Corners of a square of 22 µm, no two tips at quite one depth. */
const TIPS_UM = [
	[-11, -11, 0],
	[11, -11, 4],
	[11, 11, -3],
	[-11, 11, 2]
] as const;
export const SAMPLES = 32;
export const SAMPLING_HZ = 32000;

/** Mean waveform on four channels, µV, [channel][sample], without noise. */
export function waveformOf(cell: Cell): Float64Array {
	const uv = new Float64Array(4 * SAMPLES);
	TIPS_UM.forEach((tip, channel) => {
		const apart = Math.hypot(...cell.placeUm.map((um, axis) => um - tip[axis]));
		const size = cell.sourceUv / (1 + (apart / 25) ** 1.6);
		for (let i = 0; i < SAMPLES; i++) {
			const ms = (i * 1000) / SAMPLING_HZ - 0.25 - cell.delayMs[channel];
			const bump = (atMs: number, sdMs: number) => Math.exp(-(((ms - atMs) / sdMs) ** 2) / 2);
			uv[channel * SAMPLES + i] =
				size *
				(-bump(0, cell.troughSdMs) +
					cell.afterShare * cell.afterOfChannel[channel] * bump(cell.widthMs, cell.afterSdMs) +
					cell.beforeShare * bump(-0.22, 0.06));
		}
	});
	return uv;
}

/**
 * Spike times of a session, s, ascending: events by a rate that follows passes through place fields
 * and the 8 Hz rhythm, some of them bursts, none within the refractory period of the one before.
 */
export function spikeTrain(cell: Cell, durationS: number, random: Random): Float64Array {
	const { inFields, rhythm, burstShare, burstIntervalMs } = cell;
	// A burst brings two spikes more on average.
	const eventHz = cell.rateHz / (1 + 2 * burstShare);
	const slotS = 2;
	const times: number[] = [];
	const phase = 2 * Math.PI * random.next();
	for (let fromS = 0; fromS < durationS; fromS += slotS) {
		const gain = random.next() < 0.1 ? inFields / 0.1 : (1 - inFields) / 0.9;
		const topHz = eventHz * (cell.isInterneuron ? 1 : gain) * (1 + rhythm);
		for (let t = fromS - Math.log(1 - random.next()) / topHz; t < fromS + slotS;) {
			const wave = 1 + rhythm * Math.cos(2 * Math.PI * 8 * t + phase);
			if (random.next() * (1 + rhythm) < wave) {
				let at = t;
				times.push(at);
				if (random.next() < burstShare) {
					do {
						at += (burstIntervalMs / 1000) * Math.exp(0.25 * normal(random));
						times.push(at);
					} while (random.next() < 0.5);
				}
			}
			t -= Math.log(1 - random.next()) / topHz;
		}
	}
	times.sort((a, b) => a - b);
	let last = -Infinity;
	return Float64Array.from(
		times.filter((t) => {
			if (t - last < cell.refractoryMs / 1000 || t >= durationS) return false;
			last = t;
			return true;
		})
	);
}
