import { Invalid, Refusal, type Issue } from '$lib/server/errors';

/** What is refused before a service is asked, because of how the call was made. */
export class BadRequest extends Invalid {
	override readonly status = 400;
	constructor(issues: Issue[]) {
		super(issues, issues[0]?.message, 'bad-request');
	}
}

export class MethodNotAllowed extends Refusal {
	readonly status = 405;
	constructor(readonly allowed: readonly string[]) {
		super('method-not-allowed', `This address takes ${allowed.join(', ')}.`);
	}
}

export class UnsupportedType extends Refusal {
	readonly status = 415;
	constructor(message: string) {
		super('unsupported-media-type', message);
	}
}
