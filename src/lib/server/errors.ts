import { refusalPlace } from '$lib/format/refusal-place';
import type { DataRefusal } from '$lib/schemas/data-state';

/** What a service may refuse, told apart by class. Everything else that is thrown is a bug. */
export abstract class Refusal extends Error {
	abstract readonly status: number;
	/** Stable for programs; the message is for people and may be reworded. */
	readonly code: string;

	constructor(code: string, message: string, options?: ErrorOptions) {
		super(message, options);
		this.code = code;
		this.name = new.target.name;
	}
}

/** Absent, or hidden from this reader: the two look the same from outside. */
export class NotFound extends Refusal {
	readonly status = 404;
	constructor(message = 'There is no such record, or it is not yours to see.') {
		super('not-found', message);
	}
}

/** Visible, but not this person's to do. */
export class Forbidden extends Refusal {
	readonly status = 403;
	constructor(message = 'Your roles do not allow this. A PI can change roles on the Lab page.') {
		super('forbidden', message);
	}
}

export class Unauthenticated extends Refusal {
	readonly status = 401;
	constructor(message = 'Sign in first.', code = 'unauthenticated') {
		super(code, message);
	}
}

/** The record stands otherwise than the writer believed, or a rule of the record forbids it. */
export class Conflict extends Refusal {
	readonly status = 409;
}

/** Somebody changed the row since the writer read it. `what` as in a sentence: "animal". */
export class Stale extends Conflict {
	constructor(what: string) {
		super(
			'stale',
			`Somebody changed this ${what} meanwhile. Nothing was overwritten: copy what you typed, open the page again, and enter your change once more.`
		);
	}
}

export interface Issue {
	/** Field name as in the input, '' for the input as a whole. */
	field: string;
	message: string;
}

/** The input cannot be used; every issue names its field. */
export class Invalid extends Refusal {
	readonly status: number = 422;
	constructor(
		readonly issues: Issue[],
		message = issues[0]?.message ?? 'The input cannot be used.',
		code = 'invalid'
	) {
		super(code, message);
	}
}

/** A file that cannot be used, and where in it the reason lies. */
export class RefusedFile extends Invalid {
	constructor(readonly refusal: DataRefusal) {
		const { code, column, row, message } = refusal;
		const said = refusalPlace({ column, row }) + message;
		super([{ field: column ?? '', message: said }], said, code);
	}
}

/** A one-time address that was used, withdrawn or has run out. */
export class Gone extends Refusal {
	readonly status = 410;
}

export class TooLarge extends Refusal {
	readonly status = 413;
	constructor(message: string) {
		super('too-large', message);
	}
}

export class TooMany extends Refusal {
	readonly status = 429;
	constructor(
		readonly retryAfterS: number,
		message = `Too many tries. Wait ${Math.ceil(retryAfterS / 60)} min and try again.`
	) {
		super('too-many-tries', message);
	}
}
