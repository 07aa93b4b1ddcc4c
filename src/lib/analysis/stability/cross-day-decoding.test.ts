import { describe, expect, it } from 'vitest';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { foldsOf } from '../decoding/folds';
import { windowsOf } from '../decoding/windows';
import { smootherOf } from '../maps/smoother';
import { seeded } from '../random/seeded';
import { samplesOfSpikes } from '../spikes/samples-of-spikes';
import { crossDayDecoding, type DecodableDay } from './cross-day-decoding';

const LENGTH_CM = 200;
const arena = parseArena(`straight:${LENGTH_CM}`);
const bins = binsOf(arena, 5);
const metric = metricOf(arena);
const centresCm = Float64Array.from({ length: 12 }, (_, u) => (u + 0.5) * (LENGTH_CM / 12));

/** Four minutes of runs up and down; unit u fires at 15 Hz in the middle of its field. */
function dayOf(fieldsCm: Float64Array, seed: number): DecodableDay {
	const random = seeded(seed * 7919);
	const count = 6000;
	const dt = 0.04;
	const tS = Float64Array.from({ length: count }, (_, i) => i * dt);
	const xCm = tS.map((t) => {
		const along = (t * 25) % (2 * LENGTH_CM);
		return along < LENGTH_CM ? along : 2 * LENGTH_CM - along;
	});
	const standS = new Float64Array(count).fill(dt);
	const isUsed = new Uint8Array(count).fill(1);
	const spikeS = Array.from(fieldsCm, (fieldCm) =>
		tS.filter((_, i) => {
			const hz = 0.2 + 15 * Math.exp(-(((xCm[i] - fieldCm) / 10) ** 2) / 2);
			return random.next() < hz * dt;
		})
	);
	const windows = windowsOf(tS, standS, new Int32Array(count), isUsed, 0.25);
	const map = {
		bin: Int32Array.from(xCm, (x) => bins.of(x, NaN)),
		standS,
		bins: bins.count,
		smooth: smootherOf(arena, bins, 5, 'zero'),
		minOccupancyS: 0.1
	};
	return {
		map,
		tS,
		isUsed,
		samples: spikeS.map((times) => samplesOfSpikes(times, tS, standS)),
		spikeS,
		windows,
		folds: foldsOf(windows, 5),
		errorCm: (bin, w) => metric(bins.centreXCm[bin], NaN, xCm[windows.sample[w]], NaN)
	};
}

describe('crossDayDecoding', () => {
	it('errs as within the day while the code holds, and like chance when the fields are dealt anew', () => {
		const later = dayOf(centresCm, 1);
		const held = crossDayDecoding(dayOf(centresCm, 2), later, 'even');
		expect(held.ratio).toBeGreaterThan(0.8);
		expect(held.ratio).toBeLessThan(1.25);
		expect(held.cross.medianCm).toBeLessThan(8);
		expect(held.chanceMedianCm).toBeGreaterThan(40);
		const dealt = centresCm.map((_, u) => centresCm[(5 * u + 4) % 12]);
		const changed = crossDayDecoding(dayOf(dealt, 2), later, 'even');
		expect(changed.cross.medianCm).toBeGreaterThan(0.6 * changed.chanceMedianCm);
		expect(changed.within).toEqual(held.within);
	});

	it('errs more the further the fields drift', () => {
		const later = dayOf(centresCm, 1);
		const ratios = [0, 12, 24].map(
			(driftCm) =>
				crossDayDecoding(
					dayOf(
						centresCm.map((x) => x + driftCm),
						3
					),
					later,
					'even'
				).ratio
		);
		expect(ratios[1]).toBeGreaterThan(ratios[0]);
		expect(ratios[2]).toBeGreaterThan(ratios[1]);
	});

	it('does not depend on the order of the matched units', () => {
		const pick = (day: DecodableDay, order: readonly number[]): DecodableDay => ({
			...day,
			samples: order.map((u) => day.samples[u]),
			spikeS: order.map((u) => day.spikeS[u])
		});
		const earlier = dayOf(centresCm, 2);
		const later = dayOf(centresCm, 1);
		const order = [3, 1, 4, 0, 5, 9, 2, 6, 8, 7, 11, 10];
		const plain = crossDayDecoding(earlier, later, 'even');
		const mixed = crossDayDecoding(pick(earlier, order), pick(later, order), 'even');
		expect(mixed.cross.medianCm).toBeCloseTo(plain.cross.medianCm, 9);
		expect(mixed.within.medianCm).toBeCloseTo(plain.within.medianCm, 9);
	});

	it('counts windows in places the earlier maps never saw, and keeps their errors', () => {
		const earlier = dayOf(centresCm, 2);
		const isUsed = earlier.isUsed.map((_, i) => (earlier.map.bin[i] < 30 ? 1 : 0));
		const got = crossDayDecoding({ ...earlier, isUsed }, dayOf(centresCm, 1), 'even');
		expect(got.unscorable / got.windows).toBeCloseTo(0.25, 1);
		expect(got.cross.p95Cm).toBeGreaterThan(30);
	});

	it('says nothing without units or maps, and refuses days of different units or bins', () => {
		const later = dayOf(centresCm, 1);
		const earlier = dayOf(centresCm, 2);
		const none = { samples: [], spikeS: [] };
		const got = crossDayDecoding({ ...earlier, ...none }, { ...later, ...none }, 'even');
		expect(got).toMatchObject({ units: 0, ratio: NaN, chanceMedianCm: NaN });
		const unseen = { ...earlier, isUsed: new Uint8Array(6000) };
		expect(crossDayDecoding(unseen, later, 'even').cross.medianCm).toBeNaN();
		expect(() => crossDayDecoding({ ...earlier, ...none }, later, 'even')).toThrow(RangeError);
		const wider = { ...earlier, map: { ...earlier.map, bins: 20 } };
		expect(() => crossDayDecoding(wider, later, 'even')).toThrow(RangeError);
	});
});
