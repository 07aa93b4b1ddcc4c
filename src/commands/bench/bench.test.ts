import { beforeAll, describe, expect, it } from 'vitest';
import { crewOfOne, type Crew } from './crew';
import { decodeStep } from './decode-step';
import { mapStep } from './map-step';
import { shiftStep } from './shift-step';
import { simulateDay, type BenchDay } from './simulate-day';
import { SIZES } from './sizes';

// Figures of the small day of seed 1 by the same definitions in numpy, double precision.
describe('the steps of the bench on the small day', () => {
	let day: BenchDay;
	let crew: Crew;

	beforeAll(() => {
		day = simulateDay(SIZES.S, 1);
		crew = crewOfOne(day);
	});

	it('simulate as many spikes', () => {
		expect(day.spikeS).toHaveLength(143_882);
	});

	it('find the same split-half correlation', async () => {
		expect((await mapStep(crew, day)).splitHalfMedian).toBeCloseTo(0.99166, 5);
	});

	it('find the same information, and as many units beyond chance', async () => {
		const { bitsMedian, significant } = await shiftStep(crew, day);
		expect(bitsMedian).toBeCloseTo(0.96719, 5);
		expect(significant).toBe(34);
	});

	it('find the same median error', async () => {
		expect((await decodeStep(crew, day, 0.1)).medianErrorCm).toBeCloseTo(7.0721, 4);
	});
});
