/**
 * Spike times of one unit in few bytes, without loss. Recorders count ticks; when every time is
 * exactly k / rate for a known rate, the differences of k are written as variable-length whole
 * numbers (7 bits a byte, low first). Otherwise the float64 values themselves are written.
 *
 * Layout: byte 0 form (1 ticks, 0 plain). Ticks: rate (float64), then for each spike the step of k,
 * the first one from zero, in zigzag form. Plain: float64 each. Little-endian throughout.
 */
const PLAIN = 0;
const TICKS = 1;

/** Ticks per second tried, slow ones first: they make the shortest steps. */
const RATES = [
	1_000, 1_250, 2_000, 10_000, 20_000, 24_000, 24_414.0625, 25_000, 30_000, 31_250, 32_000, 32_552,
	40_000, 44_100, 48_000, 50_000, 96_000, 100_000, 1_000_000, 1_000_000_000
];

/**
 * @param timesS ascending, finite
 * @throws RangeError times that are not finite or do not ascend
 */
export function encodeSpikes(timesS: Float64Array): Uint8Array {
	for (let i = 0; i < timesS.length; i++) {
		if (!Number.isFinite(timesS[i])) throw new RangeError(`spike ${i} has no finite time`);
		if (i > 0 && timesS[i] < timesS[i - 1]) throw new RangeError(`spike ${i} is before the last`);
	}
	const rate = RATES.find((candidate) => timesS.every((time) => isOnTick(time, candidate)));
	return rate === undefined ? plain(timesS) : ticks(timesS, rate);
}

/**
 * @returns the exact times that were encoded
 * @throws RangeError bytes that no encoder wrote
 */
export function decodeSpikes(blob: Uint8Array): Float64Array {
	const view = new DataView(blob.buffer, blob.byteOffset, blob.byteLength);
	if (blob.length === 0) throw new RangeError('a spike blob has at least one byte');
	if (blob[0] === PLAIN && (blob.length - 1) % 8 === 0) {
		return Float64Array.from({ length: (blob.length - 1) / 8 }, (_, i) =>
			view.getFloat64(1 + 8 * i, true)
		);
	}
	if (blob[0] !== TICKS || blob.length < 9) throw new RangeError('these bytes are no spike blob');
	return fromTicks(blob, view.getFloat64(1, true));
}

function isOnTick(timeS: number, rate: number): boolean {
	const tick = Math.round(timeS * rate);
	return Math.abs(tick) < 2 ** 52 && tick / rate === timeS && !Object.is(timeS, -0);
}

function plain(timesS: Float64Array): Uint8Array {
	const out = new Uint8Array(1 + 8 * timesS.length);
	const view = new DataView(out.buffer);
	out[0] = PLAIN;
	timesS.forEach((time, i) => view.setFloat64(1 + 8 * i, time, true));
	return out;
}

function ticks(timesS: Float64Array, rate: number): Uint8Array {
	const out = new Uint8Array(9 + 8 * timesS.length);
	out[0] = TICKS;
	new DataView(out.buffer).setFloat64(1, rate, true);
	let at = 9;
	let last = 0;
	for (let i = 0; i < timesS.length; i++) {
		const tick = Math.round(timesS[i] * rate);
		const step = tick - last;
		let rest = step < 0 ? -2 * step - 1 : 2 * step;
		last = tick;
		while (rest >= 128) {
			out[at++] = (rest % 128) + 128;
			rest = Math.floor(rest / 128);
		}
		out[at++] = rest;
	}
	return out.slice(0, at);
}

function fromTicks(blob: Uint8Array, rate: number): Float64Array {
	let spikes = 0;
	for (let at = 9; at < blob.length; at++) if (blob[at] < 128) spikes++;
	if (blob.length > 9 && blob[blob.length - 1] >= 128)
		throw new RangeError('the blob is cut short');
	const out = new Float64Array(spikes);
	let at = 9;
	let tick = 0;
	for (let i = 0; i < spikes; i++) {
		let value = 0;
		let scale = 1;
		while (blob[at] >= 128) {
			value += (blob[at++] - 128) * scale;
			scale *= 128;
		}
		value += blob[at++] * scale;
		tick += value % 2 === 0 ? value / 2 : -(value + 1) / 2;
		out[i] = tick / rate;
	}
	return out;
}
