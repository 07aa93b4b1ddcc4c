import { render, screen } from '@testing-library/svelte';
import { beforeEach, expect, test } from 'vitest';
import DayStrip from './DayStrip.svelte';
import type { DayCell } from './day-strip';

function dayCell(dayNumber: number, over: Partial<DayCell> = {}): DayCell {
	return {
		day: `2026-03-${String(dayNumber + 1).padStart(2, '0')}`,
		dayNumber,
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

const cells = [
	dayCell(0),
	dayCell(1, { largestTurn: 0.25, movedCarriages: 14 }),
	dayCell(2, { yield: { units: 0, source: 'tally' } }),
	dayCell(3, { yield: { units: 46, source: 'sorted' }, errorCm: 8.46, signature: 'signed' })
];

function press(key: string) {
	const event = new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true });
	document.activeElement?.dispatchEvent(event);
	return event;
}

function focused(): string | undefined {
	return (document.activeElement as HTMLElement | null)?.dataset.day;
}

beforeEach(() => {
	render(DayStrip, { cells, current: '2026-03-03', hrefOf: () => '/' });
});

test('the tab key enters at the day on screen, and only there', () => {
	const stops = screen.getAllByRole('link').filter((link) => link.tabIndex === 0);
	expect(stops.map((link) => link.dataset.day)).toEqual(['2026-03-03']);
	expect(stops[0].getAttribute('aria-current')).toBe('date');
});

test('arrow keys move between days and stop at the ends', () => {
	screen.getByRole('link', { current: 'date' }).focus();
	press('ArrowRight');
	expect(focused()).toBe('2026-03-04');
	press('ArrowRight');
	expect(focused()).toBe('2026-03-04');
	press('Home');
	expect(focused()).toBe('2026-03-01');
	press('ArrowLeft');
	expect(focused()).toBe('2026-03-01');
});

test('keys that are not the strip’s are left alone', () => {
	screen.getByRole('link', { current: 'date' }).focus();
	expect(press('Enter').defaultPrevented).toBe(false);
	expect(press('ArrowRight').defaultPrevented).toBe(true);
});

test('a cell is heard as it is seen', () => {
	expect(
		screen.getByRole('link', { name: /^D\+1, .*largest move ¼ turn, 14 carriages moved/ })
	).toBeTruthy();
	expect(
		screen.getByRole('link', { name: /46 units sorted, decoding error 8\.5 cm, signed/ })
	).toBeTruthy();
});
