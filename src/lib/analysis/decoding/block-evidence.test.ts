import { expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { blockEvidence, plainEvidence, type BlockEvidence } from './block-evidence';
import { rateModel } from './rate-model';

it.each([1, 16, 37])('gives the same evidence compiled and plain over %s places', (places) => {
	const random = seeded(4);
	const units = 13;
	const ratesHz = Float64Array.from({ length: units * places }, () => 20 * random.next());
	const occupancyS = new Float64Array(places).fill(1);
	const model = rateModel(ratesHz, occupancyS, () => true, 'even');
	if (!model) throw new Error('no model');
	const perWindow = Array.from({ length: 70 }, () =>
		Array.from({ length: units }, (_, u) => u).filter(() => random.next() < 0.3)
	);
	const first = new Int32Array(71);
	perWindow.forEach((fired, w) => (first[w + 1] = first[w] + fired.length));
	const unit = Int32Array.from(perWindow.flat());
	const counts = { first, unit, spikes: Float64Array.from(unit, () => 1 + random.below(4)) };
	const told = (evidenceOf: BlockEvidence) => {
		const out: number[][] = [];
		evidenceOf(model, counts, 0.25, 3, 70, (w, evidence) => out.push([w, ...evidence]));
		return out;
	};
	const compiled = told(blockEvidence());
	const plain = told(plainEvidence);
	expect(compiled.map(([w]) => w)).toEqual(plain.map(([w]) => w));
	const apart = compiled.flat().map((value, k) => Math.abs(value - plain.flat()[k]));
	expect(Math.max(...apart)).toBeLessThan(1e-11);
});
