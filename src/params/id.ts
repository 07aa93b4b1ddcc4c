import { validate } from 'uuid';

/** Ids are UUIDs; anything else in an address is simply not there. */
export const match = (param: string): boolean => validate(param);
