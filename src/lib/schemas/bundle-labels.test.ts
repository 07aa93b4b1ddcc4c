import { describe, expect, it } from 'vitest';
import { expandLabels } from './bundle-labels';

describe('labels of bundles', () => {
	it.each([
		['T01-T03', ['T01', 'T02', 'T03']],
		['T9-11', ['T9', 'T10', 'T11']],
		['T01-T02, R1; S.a', ['T01', 'T02', 'R1', 'S.a']],
		['1–3', ['1', '2', '3']],
		['', []]
	])('reads "%s"', (text, labels) => {
		expect(expandLabels(text)).toEqual(labels);
	});

	it.each(['T16-T01', 'T01-R03', 'T01-T99999', 'T01 T01', 'a/b', '-'])('refuses "%s"', (text) => {
		expect(() => expandLabels(text)).toThrow(RangeError);
	});
});
