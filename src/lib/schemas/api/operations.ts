import type { Operation } from './operation';

/** Every call of this version, in the order of the document. */
export const operations: readonly Operation[] = [];
