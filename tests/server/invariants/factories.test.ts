import { describe, expect, it } from 'vitest';
import { makeAnalysis } from '../../factories/analysis';
import { makeActor } from '../../factories/actor';
import { makeDrive } from '../../factories/drive';
import { makeImplant } from '../../factories/implant';
import { makeProject } from '../../factories/project';
import { makeProtocol } from '../../factories/protocol';
import { makeRig } from '../../factories/rig';
import { makeTally } from '../../factories/tally';
import { makeTurn } from '../../factories/turn';
import { makeUnit } from '../../factories/unit';
import { makeWeight } from '../../factories/weight';

describe('factories', () => {
	it('make rows the database accepts, with what they hang on', async () => {
		await makeProject();
		await makeProtocol();
		await makeRig();
		await makeDrive();
		expect((await makeWeight()).id).toBeTruthy();
		expect((await makeTurn()).id).toBeTruthy();
		expect((await makeTally()).principal).toBe(5);
		expect((await makeUnit()).label).toBeTruthy();
		expect((await makeAnalysis()).sessionId).toBeTruthy();
	});

	it('give an implant of sixteen tetrodes on carriages of their own', async () => {
		const { bundles, carriages } = await makeImplant();
		expect(bundles.map((bundle) => bundle.carriageId)).toEqual(carriages.map(({ id }) => id));
		expect(bundles.at(-1)?.label).toBe('T16');
	});

	it('let a test override one field', async () => {
		expect((await makeActor('welfare')).roles).toEqual(new Set(['welfare']));
		expect((await makeTurn({ turns: 1.5 })).turns).toBe(1.5);
	});
});
