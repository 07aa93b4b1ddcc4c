import { describe, expect, it } from 'vitest';
import {
	ParameterError,
	SESSION_DEFAULTS,
	sessionParameters
} from '$lib/analysis/session/parameters';
import { analysisFormSchema, analysisParametersSchema } from './analysis-parameters';

/** Whether the computation itself takes a value. */
function isTaken(choice: Record<string, unknown>): boolean {
	try {
		sessionParameters({ arena: 'straight:300', ...choice });
		return true;
	} catch (fault) {
		if (fault instanceof ParameterError) return false;
		throw fault;
	}
}

describe('parameters of an analysis', () => {
	it.each([
		['binCm', [0, 0.09, 0.1, 5, 100, 100.1]],
		['smoothCm', [-1, 0, 100, 101]],
		['minSpeedCmS', [-0.1, 0, 500, 501]],
		['minOccupancyS', [0, 0.001, 60, 61]],
		['windowMs', [9, 10, 10_000, 10_001]],
		['folds', [1, 2, 2.5, 1000, 1001]],
		['shuffles', [-1, 0, 1.5, 100_000, 100_001]],
		['seed', [-1, 0, 2_147_483_647, 2_147_483_648]],
		['prior', ['even', 'time-spent', 'flat']]
	])('the form and the computation agree on %s', (name, values) => {
		for (const value of values) {
			const choice = { [name]: value };
			const isRead = analysisParametersSchema.safeParse(choice).success;
			expect(isRead, `${name} ${value}`).toBe(isTaken(choice));
		}
	});

	it('are those of session@1 when nothing is said', () => {
		const { arena, sortingId, ...standard } = analysisFormSchema.parse({});
		expect({ ...standard, defaults: 'session@1' }).toEqual(SESSION_DEFAULTS);
		expect([arena, sortingId]).toEqual(['', undefined]);
	});

	it('of another name are refused, so that a slip is not taken for a default', () => {
		expect(analysisParametersSchema.safeParse({ bincm: 5 }).success).toBe(false);
	});
});
