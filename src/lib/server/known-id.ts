import { validate } from 'uuid';
import { NotFound } from './errors';

/** An id from an address: what is not even shaped like one names nothing. @throws NotFound */
export function knownId(id: string): string {
	if (!validate(id)) throw new NotFound();
	return id;
}
