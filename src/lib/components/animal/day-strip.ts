import { formatDayNumber } from '$lib/format/day-number';
import { formatDayShort } from '$lib/format/date';
import { formatCm } from '$lib/format/measure';
import { formatQuantity } from '$lib/format/number';
import { describeTurns } from '$lib/format/turns';

export type SignatureState = 'none' | 'draft' | 'signed' | 'countersigned';

/** One lab day of an animal as the day strip shows it. */
export interface DayCell {
	/** Lab day, "2026-04-09". */
	day: string;
	/** Days since the implant's surgery; 0 is the surgery itself. */
	dayNumber: number;
	/** Signed turns of the carriage moved furthest; null when none moved. */
	largestTurn: number | null;
	movedCarriages: number;
	/** Units counted; null is not counted, which is not zero. */
	yield: { units: number; source: 'tally' | 'sorted' } | null;
	/** Median decoding error of the day's figure. */
	errorCm: number | null;
	/** Sorted by other hands or another program than the day before. */
	isSorterChange: boolean;
	/** A surgery other than the implant's. */
	hasSurgery: boolean;
	signature: SignatureState;
}

export const signatureWords: Record<SignatureState, string> = {
	none: 'no entry',
	draft: 'draft',
	signed: 'signed',
	countersigned: 'countersigned'
};

/** All that a cell shows, in words, for those who hear the strip. */
export function describeDay(cell: DayCell): string {
	const parts = [formatDayNumber(cell.dayNumber), formatDayShort(cell.day)];
	parts.push(
		cell.yield
			? `${formatQuantity(cell.yield.units, 'unit')} ${cell.yield.source === 'tally' ? 'by tally' : 'sorted'}`
			: 'units not counted'
	);
	if (cell.largestTurn !== null) {
		parts.push(
			`largest move ${describeTurns(cell.largestTurn)}, ${formatQuantity(cell.movedCarriages, 'carriage')} moved`
		);
	}
	if (cell.errorCm !== null) parts.push(`decoding error ${formatCm(cell.errorCm)}`);
	if (cell.isSorterChange) parts.push('sorter changed');
	if (cell.hasSurgery) parts.push('another surgery');
	parts.push(signatureWords[cell.signature]);
	return parts.join(', ');
}

/** The tallest bar of a strip; both sources share one scale, so they compare by eye. */
export function mostUnits(cells: DayCell[]): number {
	return cells.reduce((most, cell) => Math.max(most, cell.yield?.units ?? 0), 1);
}

/** Height of a day's bar, 0 to 1; null when it was not counted. */
export function yieldShare(cell: DayCell, most: number): number | null {
	return cell.yield && cell.yield.units / most;
}

/** Which cell a key moves to; null when the key does not belong to the strip. */
export function cellAfterKey(key: string, at: number, count: number): number | null {
	const last = count - 1;
	if (key === 'ArrowLeft') return Math.max(0, at - 1);
	if (key === 'ArrowRight') return Math.min(last, at + 1);
	if (key === 'Home') return 0;
	if (key === 'End') return last;
	return null;
}
