import { expect, test } from 'vitest';
import {
	formatBytes,
	formatCm,
	formatDepth,
	formatDuration,
	formatInformation,
	formatRate,
	formatWeight
} from './measure';

test('weights show tenths only where an animal is light', () => {
	expect(formatWeight(412.4)).toBe('412 g');
	expect(formatWeight(24.36)).toBe('24.4 g');
	expect(formatWeight(null)).toBe('–');
});

test('lengths keep the unit of their column', () => {
	expect(formatDepth(1949.6)).toBe('1950 µm');
	expect(formatDepth(-20)).toBe('−20 µm');
	expect(formatCm(8.456, 2)).toBe('8.46 cm');
});

test('rates under 1 Hz keep two decimals', () => {
	expect(formatRate(18.24)).toBe('18.2 Hz');
	expect(formatRate(0.044)).toBe('0.04 Hz');
});

test('information is per spike', () => {
	expect(formatInformation(1.169)).toBe('1.17 bit/spike');
});

test.each([
	[4.25, '4.3 s'],
	[42, '42 s'],
	[2520, '42 min'],
	[3900, '1 h 05 min'],
	[3599, '1 h 00 min']
])('%s seconds read %s', (durationS, text) => {
	expect(formatDuration(durationS)).toBe(text);
});

test.each([
	[0, '0 B'],
	[999, '999 B'],
	[1000, '1.0 kB'],
	[104_857_600, '105 MB']
])('%s bytes read %s', (bytes, text) => {
	expect(formatBytes(bytes)).toBe(text);
});
