import type { TableReader } from './table-reader';

/** The label in a row, '' where the table has no such column or the cell is empty. */
export function labelIn(reader: TableReader, role: string, row: number): string {
	const column = reader.column(role);
	return column?.ids && column.labels ? column.labels.labels[column.ids.values[row]] : '';
}

/** The number in a row, NaN where the table has no such column or the cell is empty. */
export function numberIn(reader: TableReader, role: string, row: number): number {
	return reader.column(role)?.numbers?.values[row] ?? NaN;
}
