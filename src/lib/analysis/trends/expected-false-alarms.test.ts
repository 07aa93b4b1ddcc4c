import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { expectedFalseAlarms } from './expected-false-alarms';

describe('expectedFalseAlarms', () => {
	it('is charts times days over the run length (closed form)', () => {
		const { input, expected } = referenceCase<
			{ bundles: number; recordedDays: number; ARL0: number[] },
			{ expectedFalsePerAnimal: number[] }
		>('00_checks.json', 'j1');
		const { bundles, recordedDays, ARL0 } = input;
		expect(ARL0.map((length) => expectedFalseAlarms(bundles, recordedDays, length))).toEqual(
			expected.expectedFalsePerAnimal
		);
	});

	it('refuses what is no count of charts or days, and a run without length', () => {
		expect(() => expectedFalseAlarms(-1, 30, 500)).toThrow(RangeError);
		expect(() => expectedFalseAlarms(16, NaN, 500)).toThrow(RangeError);
		expect(() => expectedFalseAlarms(16, 30, 0)).toThrow(RangeError);
	});
});
