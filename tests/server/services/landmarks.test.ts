import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/server/access';
import * as landmarks from '$lib/server/services/landmarks';
import * as turns from '$lib/server/services/turns';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeImplant } from '../../factories/implant';
import { holdLabAt } from './lab-of-tests';

let by: Actor & { personId: string };

async function rat() {
	const animal = await makeAnimal();
	const { bundles } = await makeImplant({ animalId: animal.id, tetrodes: 2 });
	await bundles[0].update({ startDepthUm: 1000 });
	return animal.code;
}

beforeAll(async () => {
	await holdLabAt('2026-03-10T12:00:00Z');
	by = await makeActor('experimenter');
});

describe('landmarks', () => {
	it('keep what was seen with the depth of that moment', async () => {
		const code = await rat();
		await turns.record(by, code, { carriage: 'C01', turns: 1, doneAt: '2026-03-10T08:00:00Z' });
		const seen = { bundle: 'T01', ripples: 2, hasTheta: true };
		await landmarks.record(by, code, [
			{ ...seen, seenAt: '2026-03-10T07:00:00Z' },
			{ ...seen, seenAt: '2026-03-10T09:00:00Z', ripples: 3 }
		]);
		const rows = await landmarks.list(by, code);
		expect(rows.map(({ depthUm, ripples, hasHash }) => [depthUm, ripples, hasHash])).toEqual([
			[1000, 2, null],
			[1317.5, 3, null]
		]);
	});

	it('move with a corrected turn, because depth is never stored', async () => {
		const code = await rat();
		const { id } = await turns.record(by, code, {
			carriage: 'C01',
			turns: 1,
			doneAt: '2026-03-10T08:00:00Z'
		});
		await landmarks.record(by, code, [{ bundle: 'T01', note: 'loud hash' }]);
		await turns.correct(by, code, id, { turns: '1/2', reason: 'misread' });
		expect((await landmarks.list(by, code))[0].depthUm).toBe(1158.75);
	});

	it('must say something, and a sharp wave which way is up', async () => {
		const code = await rat();
		const issue = (field: string) => ({ issues: [{ field }] });
		await expect(landmarks.record(by, code, [{ bundle: 'T01' }])).rejects.toMatchObject(
			issue('[0].note')
		);
		const wave = { bundle: 'T01', sharpWave: 'negative' as const };
		await expect(landmarks.record(by, code, [wave])).rejects.toMatchObject(
			issue('[0].signConvention')
		);
		await expect(landmarks.record(by, code, [{ bundle: 'T77', ripples: 1 }])).rejects.toMatchObject(
			issue('[0].bundle')
		);
		await expect(
			landmarks.record(by, code, [{ bundle: 'T01', ripples: 1, seenAt: '2026-03-11T00:00:00Z' }])
		).rejects.toMatchObject(issue('[0].seenAt'));
	});

	it('are written by those who may, and withdrawn with a reason', async () => {
		const code = await rat();
		const observer = await makeActor('observer');
		const rows = [{ bundle: 'T01', ripples: 1 }];
		await expect(landmarks.record(observer, code, rows)).rejects.toMatchObject({ status: 403 });
		const { ids } = await landmarks.record(by, code, rows);
		await expect(landmarks.withdraw(observer, ids[0], { why: 'x' })).rejects.toMatchObject({
			status: 403
		});
		await landmarks.withdraw(by, ids[0], { why: 'other bundle' });
		expect(await landmarks.list(observer, code)).toEqual([]);
	});
});
