import { demand, type Actor } from '$lib/server/access';
import * as logRows from '$lib/server/models/log-row';
import type { LogEntry, LogFilter } from '$lib/server/models/log-row';

export interface LogPage {
	items: LogEntry[];
	/** Number to pass as `before` for the next page, or null at the log's beginning. */
	next: number | null;
}

export interface Verdict {
	isIntact: boolean;
	/** Rows whose hash was computed again. */
	checked: number;
	/** Whether those are all rows there are. */
	isWhole: boolean;
	/** The first row that does not follow from the one before, and why. */
	firstFault: { id: number; why: string } | null;
}

const PAGE = 50;

/** The newest first. */
export async function page(by: Actor | null, filter: LogFilter = {}): Promise<LogPage> {
	demand(by, 'log.read');
	const rows = await logRows.newest(filter, PAGE + 1);
	const items = rows.slice(0, PAGE);
	return { items, next: rows.length > PAGE ? items[PAGE - 1].id : null };
}

/** Kinds of subject that occur, for the filter. */
export async function kinds(by: Actor | null): Promise<string[]> {
	demand(by, 'log.read');
	return logRows.kinds();
}

/**
 * Computes hashes again, inside the database, and compares each row with the one before it.
 * Rows changed, removed from the middle or slipped in are found. Rows cut off the end are not:
 * nothing after them remembers them, so compare the last number with that of a backup.
 * @param last only this many rows from the end; all when left out
 */
export async function verify(by: Actor | null, last?: number): Promise<Verdict> {
	demand(by, 'log.read');
	const { checked, isWhole, faultId, fault } = await logRows.verify(last ?? null);
	const why = {
		number: 'a row before it is missing',
		chain: 'it does not follow from the row before it',
		hash: 'it was changed after it was written'
	};
	return {
		isIntact: fault === null,
		checked,
		isWhole,
		firstFault: faultId === null || fault === null ? null : { id: faultId, why: why[fault] }
	};
}
