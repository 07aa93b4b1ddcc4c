const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const NO_VALUE = /^(|[+-]?(nan|null|na|inf(inity)?))$/i;

/** What a cell holds that is not written as plainly as the quick path wants. */
export type OddNumber = number | 'missing' | 'not-a-number';

/**
 * Reads a number with exponent, quotes taken off, or more digits than a float64 holds. With a decimal
 * comma a point is refused: it may part thousands.
 */
export function oddNumber(cell: string, decimal: '.' | ','): OddNumber {
	if (NO_VALUE.test(cell)) return 'missing';
	if (decimal === ',' && cell.includes('.')) return 'not-a-number';
	const plain = decimal === ',' ? cell.replace(',', '.') : cell;
	const value = PLAIN_NUMBER.test(plain) ? Number(plain) : NaN;
	return Number.isFinite(value) ? value : 'not-a-number';
}
