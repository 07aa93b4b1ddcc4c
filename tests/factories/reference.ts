import { readFileSync } from 'node:fs';

/** One case of a file under tests/fixtures/reference; what it holds is known to the test alone. */
export interface ReferenceCase<Input, Expected> {
	readonly id: string;
	readonly input: Input;
	readonly expected: Expected;
	/** Absolute tolerance. */
	readonly tol: number;
	readonly units: readonly unknown[];
}

/** The case of an outside reference file. */
export function referenceCase<Input, Expected>(
	file: string,
	id: string
): ReferenceCase<Input, Expected> {
	const path = new URL(`../fixtures/reference/${file}`, import.meta.url);
	const { cases } = JSON.parse(readFileSync(path, 'utf8')) as {
		cases: ReferenceCase<Input, Expected>[];
	};
	const found = cases.find((one) => one.id === id);
	if (!found) throw new Error(`${file} has no case ${id}`);
	return found;
}

/** Numbers of a reference file, null read as NaN. */
export function numbers(values: readonly (number | null)[]): Float64Array {
	return Float64Array.from(values, (value) => value ?? NaN);
}

/** Largest absolute difference; NaN must meet NaN, otherwise Infinity. */
export function worstDifference(
	got: ArrayLike<number>,
	expected: ArrayLike<number | null>
): number {
	if (got.length !== expected.length) return Infinity;
	let worst = 0;
	for (let i = 0; i < got.length; i++) {
		const want = expected[i] ?? NaN;
		if (Number.isNaN(want) !== Number.isNaN(got[i])) return Infinity;
		if (!Number.isNaN(want)) worst = Math.max(worst, Math.abs(got[i] - want));
	}
	return worst;
}
