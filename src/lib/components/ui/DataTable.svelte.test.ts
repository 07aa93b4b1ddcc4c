import { fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, beforeEach, expect, test } from 'vitest';
import type { DataColumn } from './data-table';
import DataTable from './DataTable.svelte';

interface Row {
	code: string;
	weightG: number | null;
}

const columns: DataColumn<Row>[] = [
	{ id: 'code', label: 'Code', value: (row) => row.code, isFixed: true },
	{ id: 'weight', label: 'Weight, g', value: (row) => row.weightG, isFigure: true }
];

const rows: Row[] = [
	{ code: 'R031', weightG: 412 },
	{ code: 'M112', weightG: null },
	{ code: 'R029', weightG: 88 }
];

function show() {
	render(DataTable<Row>, {
		caption: 'Animals',
		rows,
		columns,
		rowKey: (row: Row) => row.code,
		storageKey: 'animals',
		searchLabel: 'Search animals',
		noun: 'animal'
	});
}

function codes(): (string | undefined)[] {
	return screen
		.getAllByRole('row')
		.slice(1)
		.map((row) => within(row).getAllByRole('cell')[0].textContent?.trim());
}

beforeEach(() => localStorage.clear());
afterEach(() => localStorage.clear());

test('the head sorts by size, and what was not measured stays last', async () => {
	show();
	const head = screen.getByRole('button', { name: 'Weight, g' });
	await fireEvent.click(head);
	const first = codes();
	await fireEvent.click(head);
	expect([first, codes()].map((order) => order.at(-1))).toEqual(['M112', 'M112']);
	expect(first.slice(0, 2)).toEqual(codes().slice(0, 2).reverse());
	expect(head.closest('th')?.getAttribute('aria-sort')).toMatch(/ending$/);
});

test('a search that fits nothing says so', async () => {
	show();
	await fireEvent.input(screen.getByLabelText('Search animals'), { target: { value: 'r02' } });
	expect(codes()).toEqual(['R029']);
	await fireEvent.input(screen.getByLabelText('Search animals'), { target: { value: 'zebra' } });
	expect(screen.getByText(/Nothing matches “zebra”/)).toBeTruthy();
});

test('columns hidden on this device stay hidden', async () => {
	localStorage.setItem('animals', '["weight"]');
	show();
	await Promise.resolve();
	expect(screen.queryByRole('button', { name: 'Weight, g' })).toBeNull();
	expect(screen.getByRole('button', { name: 'Code' })).toBeTruthy();
});
