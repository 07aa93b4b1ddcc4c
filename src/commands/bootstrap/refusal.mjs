/** A command that cannot go on and can say why in one sentence; no stack is shown for it. */
export class Refusal extends Error {
	/**
	 * @param {string} message what happened, what is safe and what to do
	 * @param {number} [exitCode]
	 */
	constructor(message, exitCode = 1) {
		super(message);
		this.name = 'Refusal';
		this.exitCode = exitCode;
	}
}
