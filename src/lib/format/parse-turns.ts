const VULGAR: Record<string, string> = {
	'⅛': '1/8',
	'¼': '1/4',
	'⅜': '3/8',
	'½': '1/2',
	'⅝': '5/8',
	'¾': '3/4',
	'⅞': '7/8',
	'⅓': '1/3',
	'⅔': '2/3'
};

const DECIMAL = /^\d*[.,]?\d+$/;
const FRACTION = /^(?:(\d+)\s+)?(\d+)\/(\d+)$/;

/** The ledger keeps turns to five decimals; thirds are the ones that need them. */
const toLedger = (turns: number) => Math.round(turns * 1e5) / 1e5;

/**
 * Reads screw turns as people write them: `1/4`, `-1/8`, `1 1/2`, `0.5`, `0,5`, `1½`, `−⅛`.
 * @returns signed turns to five decimals, undefined when the text is no amount of turns
 */
export function parseTurns(text: string): number | undefined {
	const spelt = text.replace(/[⅛¼⅜½⅝¾⅞⅓⅔]/g, (sign) => ` ${VULGAR[sign]}`).trim();
	const sign = /^[-−–]/.test(spelt) ? -1 : 1;
	const amount = spelt.replace(/^[-−–+]\s*/, '');
	const turns = parseAmount(amount);
	// Adding 0 keeps "-0" from becoming a turn back by nothing.
	return turns === undefined ? undefined : toLedger(sign * turns) + 0;
}

function parseAmount(amount: string): number | undefined {
	if (DECIMAL.test(amount)) return Number(amount.replace(',', '.'));
	const parts = FRACTION.exec(amount);
	if (!parts) return undefined;
	const [, whole = '0', above, below] = parts;
	if (Number(below) === 0) return undefined;
	return Number(whole) + Number(above) / Number(below);
}
