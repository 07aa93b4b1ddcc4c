/** A carriage or bundle as people name it; its implant by letter. */
export interface NamedPart {
	id: string;
	label: string;
	letter: string;
}

/** `R031-T07`; with a second implant `R031-B-T07`. The first implant's letter is left out. */
export function partCode(animalCode: string, { letter, label }: Omit<NamedPart, 'id'>): string {
	return letter === 'A' ? `${animalCode}-${label}` : `${animalCode}-${letter}-${label}`;
}

/**
 * Finds the part a person names by id, code (`R031-B-T07`) or the code without the animal
 * (`B-T07`, and `T07` for the first implant). Capital letters do not matter.
 */
export function partNamed<P extends NamedPart>(
	parts: readonly P[],
	name: string,
	animalCode: string
): P | undefined {
	const asked = name.trim().toLowerCase();
	const isCalled = (part: P) => {
		const full = partCode(animalCode, part);
		const withLetter = `${part.letter}-${part.label}`;
		return [part.id, full, full.slice(animalCode.length + 1), withLetter].some(
			(word) => word.toLowerCase() === asked
		);
	};
	return parts.find(isCalled);
}
