/** Distance errors of answers that know nothing, the true place being uniform. */
export interface Chance {
	readonly meanCm: number;
	readonly medianCm: number;
	readonly p95Cm: number;
	/** Share of errors of at most d cm. */
	readonly within: (dCm: number) => number;
}

const share = (value: number) => Math.max(0, Math.min(1, value));

function positive(lengthCm: number): number {
	if (!(lengthCm > 0)) throw new RangeError(`a track of ${lengthCm} cm has no chance level`);
	return lengthCm;
}

/**
 * A uniform guess on a line: |difference of two uniform places| has density 2(L − d)/L².
 * @throws RangeError lengthCm not above 0
 */
export function lineGuess(lengthCm: number): Chance {
	const length = positive(lengthCm);
	return {
		meanCm: length / 3,
		medianCm: length * (1 - Math.SQRT1_2),
		p95Cm: length * (1 - Math.sqrt(0.05)),
		within: (dCm) => 1 - (1 - share(dCm / length)) ** 2
	};
}

/**
 * The middle of a line, always: the error is uniform in [0, L/2]. Less than that of a uniform guess,
 * so a decoder that answers the middle seems better than chance.
 * @throws RangeError lengthCm not above 0
 */
export function middleGuess(lengthCm: number): Chance {
	return uniformTo(positive(lengthCm) / 2);
}

/**
 * Any answer on a ring that does not depend on the place: the error is uniform in [0, C/2].
 * @throws RangeError lengthCm not above 0
 */
export function ringGuess(lengthCm: number): Chance {
	return uniformTo(positive(lengthCm) / 2);
}

function uniformTo(mostCm: number): Chance {
	return {
		meanCm: mostCm / 2,
		medianCm: mostCm / 2,
		p95Cm: 0.95 * mostCm,
		within: (dCm) => share(dCm / mostCm)
	};
}
