interface Place {
	/** As a spreadsheet counts: the header is row 1. */
	row: number | null;
	column: string | null;
}

/** Where in a file a refusal points: "Row 7, column x_cm: ", or nothing. */
export function refusalPlace({ row, column }: Place): string {
	if (row === null && column === null) return '';
	if (row === null) return `Column ${column}: `;
	return column === null ? `Row ${row}: ` : `Row ${row}, column ${column}: `;
}
