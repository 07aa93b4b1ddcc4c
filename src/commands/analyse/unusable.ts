/** Input that cannot be used; the message is the one line a person gets. */
export class Unusable extends Error {
	override readonly name = 'Unusable';
}
