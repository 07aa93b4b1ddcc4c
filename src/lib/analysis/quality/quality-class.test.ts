import { describe, expect, it } from 'vitest';
import { contamination, contaminationFloor, contaminationLimit } from './contamination';
import { QUALITY_THRESHOLDS, qualityClass, type QualityFigures } from './quality-class';

const count = (spikes: number, violations: number) => ({
	spikes,
	durationS: 1800,
	violations,
	refractoryS: 0.002,
	deadTimeS: 0
});
const contaminated = (spikes: number, violations: number) => ({
	contamination: contamination(count(spikes, violations)),
	contaminationLimit: contaminationLimit(count(spikes, violations)),
	contaminationFloor: contaminationFloor(count(spikes, violations))
});
const unmeasured = { signalToNoise: NaN, isolationDistance: NaN, lRatio: NaN };
const clean: QualityFigures = {
	violationShare: 0.001,
	...contaminated(9000, 2),
	presenceRatio: 1,
	signalToNoise: 6,
	isolationDistance: 25,
	lRatio: 0.01
};

describe('qualityClass', () => {
	it('is good when every figure is, and names its thresholds', () => {
		const got = qualityClass(clean);
		expect(got.level).toBe('good');
		expect(got.thresholds).toBe('session@1');
		expect(new Set(Object.values(got.criteria))).toEqual(new Set(['good']));
	});

	it.each([
		['violationShare', 0.004999, 0.005, 0.01],
		['signalToNoise', 5, 4.999, 2.999],
		['isolationDistance', 20, 19.999, 9.999],
		['lRatio', 0.0499, 0.05, 0.2]
	] as const)('turns at the bounds of %s', (figure, good, fair, poor) => {
		const levels = [good, fair, poor].map((value) => qualityClass({ ...clean, [figure]: value }));
		expect(levels.map(({ criteria }) => criteria[figure])).toEqual(['good', 'fair', 'poor']);
		expect(levels.map(({ level }) => level)).toEqual(['good', 'fair', 'poor']);
	});

	it('accepts contamination to a tenth, warns to a fifth, and refuses what has no root', () => {
		const level = (oneUnit: number) =>
			qualityClass({
				...clean,
				contamination: { q: 0.3, oneUnit, manyUnits: 0 },
				contaminationFloor: { q: 0.3, oneUnit, manyUnits: 0 }
			}).criteria.contamination;
		expect([0.1, 0.1001, 0.2, 0.2001, NaN].map(level)).toEqual([
			'good',
			'fair',
			'fair',
			'poor',
			'poor'
		]);
	});

	it('does not call a slow unit poor for two violations, which may be chance', () => {
		// 1748 spikes in 1800 s: two pairs give q > ½, the lower end of their interval 0.24 pairs.
		const slow = { ...clean, ...contaminated(1748, 2) };
		expect(slow.contamination.oneUnit).toBeNaN();
		expect(slow.contaminationFloor.oneUnit).toBeLessThan(0.05);
		expect(qualityClass(slow).criteria.contamination).toBe('fair');
		expect(qualityClass({ ...clean, ...contaminated(1748, 12) }).criteria.contamination).toBe(
			'poor'
		);
	});

	it('does not call a unit good that a short session without violations cannot vouch for', () => {
		const silent = { ...clean, ...contaminated(900, 0), violationShare: 0 };
		expect(qualityClass(silent).criteria.contamination).toBe('not-known');
		expect(qualityClass(silent).level).toBe('fair');
		expect(qualityClass({ ...silent, ...unmeasured }).level).toBe('not-known');
		expect(qualityClass({ ...clean, ...contaminated(9000, 0) }).level).toBe('good');
	});

	it('never makes a place cell poor for being silent elsewhere', () => {
		expect(qualityClass({ ...clean, presenceRatio: 0.1 }).level).toBe('fair');
	});

	it('leaves out what was not measured, and knows nothing of a unit without spikes', () => {
		expect(qualityClass({ ...clean, ...unmeasured }).level).toBe('good');
		const nothing = {
			...unmeasured,
			violationShare: NaN,
			...contaminated(0, 0),
			presenceRatio: NaN
		};
		expect(qualityClass(nothing).level).toBe('not-known');
	});

	it('follows thresholds of the lab', () => {
		const strict = { ...QUALITY_THRESHOLDS, name: 'lab', signalToNoise: [8, 7] as const };
		expect(qualityClass(clean, strict)).toMatchObject({ level: 'poor', thresholds: 'lab' });
	});
});
