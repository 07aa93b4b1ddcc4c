import { EPOCH_KINDS, type Epoch } from '../position/epochs';
import { labelIn, numberIn } from './cells';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

/**
 * Epochs from a table that has been read, in the order of the file.
 * @throws TableError a kind that is none, or an epoch that does not end after it begins
 */
export function epochsOf(reader: TableReader): Epoch[] {
	return Array.from({ length: reader.rows }, (_, row): Epoch => {
		const written = labelIn(reader, 'kind', row);
		const kind = EPOCH_KINDS.find((known) => known === written.toLowerCase());
		if (!kind) {
			const reason = `"${written}" is no kind of epoch; write ${EPOCH_KINDS.join(', ')}`;
			throw new TableError('epochs', 'not-a-kind', reason, row + 2, 'kind');
		}
		const startS = numberIn(reader, 'start_s', row);
		const stopS = numberIn(reader, 'stop_s', row);
		if (!(stopS > startS)) {
			const reason = `${stopS} s is not after the start at ${startS} s`;
			throw new TableError('epochs', 'time-order', reason, row + 2, 'stop_s');
		}
		return { name: labelIn(reader, 'name', row), kind, startS, stopS };
	});
}
