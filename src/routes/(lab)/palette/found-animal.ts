/** An animal as the keyboard palette lists it. */
export interface FoundAnimal {
	code: string;
	detail: string;
}
