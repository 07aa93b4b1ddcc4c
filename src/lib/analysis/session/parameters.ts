import { ArenaError, parseArena } from '../arena/parse-arena';
import type { Prior } from '../decoding/rate-model';

/** Everything that decides the figures of a session, besides its data. */
export interface SessionParameters {
	readonly arena: string;
	readonly binCm: number;
	readonly smoothCm: number;
	readonly minSpeedCmS: number;
	readonly minOccupancyS: number;
	readonly windowMs: number;
	readonly folds: number;
	readonly prior: Prior;
	readonly shuffles: number;
	readonly seed: number;
	/** Name of the rules that no parameter covers; later improvements get another name. */
	readonly defaults: 'session@1';
}

/** What a caller may leave out. */
export type GivenParameters = { readonly arena: string } & Partial<
	Omit<SessionParameters, 'arena' | 'defaults'>
>;

export const SESSION_DEFAULTS: Omit<SessionParameters, 'arena'> = {
	binCm: 5,
	smoothCm: 5,
	minSpeedCmS: 5,
	minOccupancyS: 0.1,
	windowMs: 250,
	folds: 10,
	prior: 'even',
	shuffles: 500,
	seed: 1,
	defaults: 'session@1'
};

/** A parameter that cannot be used. */
export class ParameterError extends Error {
	override readonly name = 'ParameterError';

	constructor(
		readonly field: keyof SessionParameters,
		readonly reason: string
	) {
		super(`${field}: ${reason}`);
	}
}

const LIMITS = {
	binCm: { least: 0.1, most: 100, isWhole: false },
	smoothCm: { least: 0, most: 100, isWhole: false },
	minSpeedCmS: { least: 0, most: 500, isWhole: false },
	minOccupancyS: { least: 0.001, most: 60, isWhole: false },
	windowMs: { least: 10, most: 10_000, isWhole: false },
	folds: { least: 2, most: 1000, isWhole: true },
	shuffles: { least: 0, most: 100_000, isWhole: true },
	seed: { least: 0, most: 2_147_483_647, isWhole: true }
} as const;

/**
 * Fills in the defaults and checks every parameter.
 * @throws ParameterError naming the field and what is allowed
 */
export function sessionParameters(given: GivenParameters): SessionParameters {
	const filled: SessionParameters = { ...SESSION_DEFAULTS, ...withoutUndefined(given) };
	try {
		parseArena(filled.arena);
	} catch (error) {
		if (error instanceof ArenaError) throw new ParameterError('arena', error.message);
		throw error;
	}
	for (const field of Object.keys(LIMITS) as (keyof typeof LIMITS)[]) {
		const { least, most, isWhole } = LIMITS[field];
		const value = filled[field];
		if (!(value >= least && value <= most) || (isWhole && !Number.isInteger(value))) {
			const kind = isWhole ? 'a whole number' : 'a number';
			throw new ParameterError(field, `must be ${kind} from ${least} to ${most}, got ${value}`);
		}
	}
	if (filled.prior !== 'even' && filled.prior !== 'time-spent') {
		throw new ParameterError('prior', `must be even or time-spent, got ${String(filled.prior)}`);
	}
	return filled;
}

function withoutUndefined(given: GivenParameters): GivenParameters {
	const entries = Object.entries(given).filter(([, value]) => value !== undefined);
	return { ...Object.fromEntries(entries), arena: given.arena };
}
