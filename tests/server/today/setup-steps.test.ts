import { describe, expect, it } from 'vitest';
import * as today from '$lib/server/services/today';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeArena } from '../../factories/arena';
import { makeImplant } from '../../factories/implant';
import { makeProject } from '../../factories/project';
import { makeProtocol } from '../../factories/protocol';
import { makeSession } from '../../factories/session';

const stepsFor = async (...roles: Parameters<typeof makeActor>) =>
	(await today.view(await makeActor(...roles))).setup;

describe('setting up a lab', () => {
	it('begins with everything to do, and says which steps are the reader’s', async () => {
		const steps = await stepsFor('experimenter');
		expect(steps.map((step) => step.key)).toEqual([
			'project',
			'protocol',
			'arena',
			'drive-design',
			'animal',
			'implant',
			'session'
		]);
		expect(steps.every((step) => !step.isDone)).toBe(true);
		expect(steps.filter((step) => step.isMine).map((step) => step.key)).toEqual([
			'animal',
			'session'
		]);
		expect((await stepsFor('pi')).every((step) => step.isMine)).toBe(true);
		expect((await stepsFor('observer')).some((step) => step.isMine)).toBe(false);
	});

	it('is nothing an admin reads: what is there are animals’ data', async () => {
		expect(await stepsFor('admin')).toEqual([]);
	});

	it('ticks what is there and goes on with the animal that has an implant', async () => {
		await Promise.all([makeProject(), makeProtocol()]);
		await makeArena();
		await makeAnimal();
		const operated = await makeAnimal();
		await makeImplant({ animalId: operated.id, tetrodes: 1 });
		const steps = await stepsFor('pi');
		expect(steps.filter((step) => !step.isDone).map((step) => step.key)).toEqual(['session']);
		expect(steps.at(-1)?.animal).toBe(operated.code);
	});

	it('is over with the first session', async () => {
		await makeSession();
		expect(await stepsFor('pi')).toEqual([]);
	});
});
