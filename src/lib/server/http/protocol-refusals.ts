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

export class PreconditionFailed extends Refusal {
	readonly status = 412;
	constructor(what: string) {
		super(
			'precondition-failed',
			`The ${what} was changed since you read it. Nothing was recorded: read it again, then send your change with the new ETag.`
		);
	}
}

export class CutOff extends Refusal {
	readonly status = 400;
	constructor() {
		super('cut-off', 'The upload was cut off. Nothing was kept: send the file again.');
	}
}
