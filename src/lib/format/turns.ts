import { formatNumber } from './number';

const fractions: Record<number, string> = {
	1: '1/16',
	2: '⅛',
	3: '3/16',
	4: '¼',
	5: '5/16',
	6: '⅜',
	7: '7/16',
	8: '½',
	9: '9/16',
	10: '⅝',
	11: '11/16',
	12: '¾',
	13: '13/16',
	14: '⅞',
	15: '15/16'
};

/**
 * Screw turns as people say them: ¼, 1½, −⅛; sixteenths spelt out.
 * Amounts that are no whole number of sixteenths keep their decimals.
 */
export function formatTurns(turns: number): string {
	const sign = turns < 0 ? '−' : '';
	const amount = Math.abs(turns);
	const sixteenths = Math.round(amount * 16);
	if (Math.abs(amount * 16 - sixteenths) > 0.01) return sign + formatNumber(amount, 3);
	const whole = Math.floor(sixteenths / 16);
	const rest = fractions[sixteenths % 16];
	if (rest === undefined) return sign + whole;
	if (whole === 0) return sign + rest;
	return sign + whole + (rest.includes('/') ? ' ' : '') + rest;
}

/** In words, for labels: "¼ turn", "1½ turns", "⅛ turn back". */
export function describeTurns(turns: number): string {
	const noun = Math.abs(turns) > 1 ? 'turns' : 'turn';
	return turns < 0 ? `${formatTurns(-turns)} ${noun} back` : `${formatTurns(turns)} ${noun}`;
}
