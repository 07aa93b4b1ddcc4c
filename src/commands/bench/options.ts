import { parseArgs } from 'node:util';
import { Refusal } from '../bootstrap/refusal.mjs';
import { SIZES, type SizeName } from './sizes';

export const STEPS = ['csv', 'maps', 'shifts', 'decode-100', 'decode-250'] as const;
export type StepName = (typeof STEPS)[number];

export interface BenchOptions {
	readonly sizes: readonly SizeName[];
	readonly steps: readonly StepName[];
	readonly repetitions: number;
	readonly threads: number;
	readonly seed: number;
}

/**
 * Reads `bench [STEP …] [--size S,M,L] [--reps 5] [--threads 2] [--seed 1]`.
 * @throws Refusal naming what is possible
 */
export function readBenchOptions(args: string[]): BenchOptions {
	const { values, positionals } = parseArgs({
		args,
		allowPositionals: true,
		options: {
			size: { type: 'string', default: Object.keys(SIZES).join(',') },
			reps: { type: 'string', default: '5' },
			threads: { type: 'string', default: '2' },
			seed: { type: 'string', default: '1' }
		}
	});
	return {
		sizes: values.size.split(',').map((name) => oneOf(name, Object.keys(SIZES) as SizeName[])),
		steps: positionals.length > 0 ? positionals.map((name) => oneOf(name, STEPS)) : STEPS,
		repetitions: whole('reps', values.reps),
		threads: whole('threads', values.threads),
		seed: whole('seed', values.seed)
	};
}

function oneOf<T extends string>(given: string, known: readonly T[]): T {
	const found = known.find((name) => name === given);
	if (!found) throw new Refusal(`There is no "${given}". There are: ${known.join(', ')}`, 2);
	return found;
}

function whole(option: string, text: string): number {
	const value = Number(text);
	if (!Number.isInteger(value) || value < 1) {
		throw new Refusal(`--${option} must be a whole number from 1, got ${text}`, 2);
	}
	return value;
}
