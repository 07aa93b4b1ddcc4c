/** Screens show a true minus, and a missing value as a dash, never as 0. */
export const absent = '–';

/** Fixed decimals with a true minus; null and NaN are absent, and −0 is 0. */
export function formatNumber(value: number | null, decimals = 0): string {
	if (value === null || Number.isNaN(value)) return absent;
	const text = value.toFixed(decimals);
	return Number(text) === 0 ? text.replace('-', '') : text.replace('-', '−');
}

/** Groups thousands with a thin space, which no reader takes for a decimal mark. */
export function formatCount(value: number | null): string {
	if (value === null || Number.isNaN(value)) return absent;
	return formatNumber(value).replace(/\B(?=(\d{3})+(?!\d))/g, '\u2009');
}

/** "1 animal", "2 animals"; the plural is the noun with an s unless given. */
export function formatQuantity(count: number, one: string, many = `${one}s`): string {
	return `${formatCount(count)} ${count === 1 ? one : many}`;
}

/** A share from 0 to 1 as "91 %". */
export function formatShare(share: number | null, decimals = 0): string {
	return share === null || Number.isNaN(share)
		? absent
		: `${formatNumber(share * 100, decimals)} %`;
}
