import { expect, test } from 'vitest';
import { cellAfterKey, describeDay, mostUnits, yieldShare, type DayCell } from './day-strip';

function dayCell(over: Partial<DayCell> = {}): DayCell {
	return {
		day: '2026-03-29',
		dayNumber: 12,
		largestTurn: null,
		movedCarriages: 0,
		yield: null,
		errorCm: null,
		isSorterChange: false,
		hasSurgery: false,
		signature: 'none',
		...over
	};
}

test('a full day is told in words', () => {
	const cell = dayCell({
		largestTurn: 0.25,
		movedCarriages: 14,
		yield: { units: 39, source: 'sorted' },
		errorCm: 8.46,
		isSorterChange: true,
		signature: 'signed'
	});
	expect(describeDay(cell)).toBe(
		'D+12, 29 Mar, 39 units sorted, largest move ¼ turn, 14 carriages moved, decoding error 8.5 cm, sorter changed, signed'
	);
});

test('a day that was not counted differs from a day with no units', () => {
	expect(describeDay(dayCell())).toContain('units not counted');
	expect(describeDay(dayCell({ yield: { units: 0, source: 'tally' } }))).toContain(
		'0 units by tally'
	);
	expect(yieldShare(dayCell(), 46)).toBeNull();
	expect(yieldShare(dayCell({ yield: { units: 0, source: 'tally' } }), 46)).toBe(0);
});

test('bars are measured against the best day, and a strip without units has no bars', () => {
	const best = dayCell({ yield: { units: 46, source: 'sorted' } });
	const half = dayCell({ yield: { units: 23, source: 'tally' } });
	expect(yieldShare(half, mostUnits([best, half, dayCell()]))).toBe(0.5);
	expect(mostUnits([dayCell()])).toBe(1);
});

test.each([
	['ArrowRight', 3, 4],
	['ArrowRight', 9, 9],
	['ArrowLeft', 0, 0],
	['Home', 5, 0],
	['End', 5, 9],
	['Enter', 5, null]
])('%s on cell %s of ten leads to %s', (key, at, to) => {
	expect(cellAfterKey(key, at, 10)).toBe(to);
});
