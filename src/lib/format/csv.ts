type Value = string | number | null;

function quoted(value: Value): string {
	if (value === null || (typeof value === 'number' && Number.isNaN(value))) return '';
	const text = String(value);
	return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** A table as CSV (RFC 4180): commas, points, missing values empty. */
export function csvText(header: string[], rows: Iterable<Value[]>): string {
	const lines = [header, ...rows].map((row) => row.map(quoted).join(','));
	return lines.join('\r\n') + '\r\n';
}
