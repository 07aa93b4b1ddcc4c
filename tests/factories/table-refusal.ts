import { TableError } from '../../src/lib/analysis/tables/table-error';

/** What a table was refused with. @throws Error when it was not */
export async function tableRefusal(reading: Promise<unknown>): Promise<TableError> {
	try {
		await reading;
	} catch (error) {
		if (error instanceof TableError) return error;
		throw error;
	}
	throw new Error('the table was not refused');
}
