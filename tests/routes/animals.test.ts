import { beforeAll, describe, expect, it } from 'vitest';
import * as animals from '$lib/server/services/animals';
import { makeActor } from '../factories/actor';
import { makeAnimal } from '../factories/animal';
import { makeDriveDesign } from '../factories/drive-design';
import { makeProtocol } from '../factories/protocol';
import * as list from '../../src/routes/(lab)/animals/+page.server';
import * as one from '../../src/routes/(lab)/animals/[code]/+page.server';
import * as layout from '../../src/routes/(lab)/animals/[code]/+layout.server';
import * as edit from '../../src/routes/(lab)/animals/[code]/edit/+page.server';
import * as implant from '../../src/routes/(lab)/animals/[code]/implants/new/+page.server';
import * as fresh from '../../src/routes/(lab)/animals/new/+page.server';
import * as paste from '../../src/routes/(lab)/animals/paste/+page.server';
import { coverAnimal } from '../server/implants/cover-animal';
import { answerTo } from './run-action';

type Made = Awaited<ReturnType<typeof makeActor>>;

let experimenter: Made;
let surgeon: Made;
let observer: Made;

beforeAll(async () => {
	[experimenter, surgeon, observer] = await Promise.all([
		makeActor('experimenter'),
		makeActor('surgeon'),
		makeActor('observer')
	]);
});

const facts = (code: string, fields: Record<string, string> = {}) => ({
	code,
	species: 'rat',
	strain: '',
	sex: 'male',
	birthDate: '',
	source: '',
	status: 'in-lab',
	baselineWeightG: '',
	note: '',
	revision: '0',
	...fields
});

describe('pages of animals', () => {
	it('are no admin’s to read', async () => {
		const admin = await makeActor('admin');
		const { code } = await makeAnimal();
		expect(await answerTo(list.load, { actor: admin })).toMatchObject({ status: 403 });
		expect(await answerTo(layout.load, { params: { code }, actor: admin })).toMatchObject({
			status: 403
		});
	});

	it('are not there for an unknown code', async () => {
		const visit = { params: { code: 'X999' }, actor: observer };
		expect(await answerTo(layout.load, visit)).toMatchObject({ status: 404 });
	});
});

describe('a new animal', () => {
	it('is refused to observers before anything is read', async () => {
		expect(await answerTo(fresh.load, { actor: observer })).toMatchObject({ status: 403 });
		const post = { actor: observer, form: facts('A1') };
		expect(await answerTo(fresh.actions.default, post)).toMatchObject({ status: 403 });
	});

	it('leads to its page, and a taken code comes back with what was typed', async () => {
		const { number } = await makeProtocol();
		const form = facts('A2', { protocol: number, project: '', memberSince: '', strain: 'Wistar' });
		const post = () => answerTo(fresh.actions.default, { actor: experimenter, form });
		expect(await post()).toMatchObject({ status: 303, location: '/animals/A2' });
		expect(await post()).toMatchObject({
			status: 409,
			data: { form: { data: { strain: 'Wistar' } } }
		});
	});
});

describe('an edit', () => {
	it('made on an old form overwrites nothing', async () => {
		const { code } = await makeAnimal();
		const post = (strain: string) =>
			answerTo(edit.actions.edit, {
				params: { code },
				actor: experimenter,
				form: facts(code, { strain })
			});
		expect(await post('Wistar')).toMatchObject({ status: 303 });
		expect(await post('Lister')).toMatchObject({
			status: 409,
			data: {
				form: {
					data: { strain: 'Lister' },
					errors: { _errors: [expect.stringContaining('Nothing was overwritten')] }
				}
			}
		});
		expect((await animals.get(observer, code)).strain).toBe('Wistar');
	});
});

describe('a pasted list', () => {
	it('is shown with its faults and not saved', async () => {
		const text = 'A10,rat\nA11,cat';
		const visit = { actor: experimenter, form: { text } };
		expect(await answerTo(paste.actions.preview, visit)).toMatchObject({
			text,
			pasted: { rows: [{ issues: [] }, { issues: [{ column: 'species' }] }] }
		});
		expect(await answerTo(paste.actions.save, visit)).toMatchObject({
			status: 422,
			data: { refusal: expect.stringContaining('Line 2') }
		});
	});

	it('leads to the animals once saved', async () => {
		const visit = { actor: experimenter, form: { text: 'A20,rat\nA21,mouse' } };
		expect(await answerTo(paste.actions.save, visit)).toMatchObject({
			status: 303,
			location: '/animals'
		});
	});
});

describe('actions on an animal’s page', () => {
	it('are refused to observers, each of them', async () => {
		const { code } = await makeAnimal();
		const id = '01890a5d-ac96-774b-bcce-b302099a8057';
		const sent: Record<keyof typeof one.actions, Record<string, string>> = {
			weigh: { grossG: '400', measuredAt: '', note: '' },
			withdrawWeight: { id, why: 'x' },
			joinProtocol: { id },
			joinProject: { id },
			leave: { kind: 'protocol', id },
			nameDeputy: { id },
			endDeputy: { id },
			unseal: { id }
		};
		for (const [name, form] of Object.entries(sent)) {
			const answer = await answerTo(one.actions[name], {
				params: { code },
				actor: observer,
				form
			});
			// Observers may open allocations; this one is not there.
			expect(answer, name).toMatchObject({ status: name === 'unseal' ? 404 : 403 });
		}
	});

	it('enter a weight at the lab’s own hour, and refuse a blank one', async () => {
		const { code } = await makeAnimal();
		const weigh = (grossG: string) =>
			answerTo(one.actions.weigh, {
				params: { code },
				actor: experimenter,
				form: { grossG, measuredAt: '2026-03-02T08:30', note: '' }
			});
		expect(await weigh('')).toMatchObject({ status: 422 });
		expect(await weigh('390.5')).toMatchObject({ done: 'The weight is entered.' });
		expect((await animals.get(observer, code)).weight).toMatchObject({ weightG: 390.5 });
	});

	it('say why a protocol cannot be joined', async () => {
		const { code } = await makeAnimal();
		const { id } = await makeProtocol({ expiresOn: '2020-01-31' });
		const answer = await answerTo(one.actions.joinProtocol, {
			params: { code },
			actor: experimenter,
			form: { id, from: '' }
		});
		expect(answer).toMatchObject({
			status: 409,
			data: { refusal: expect.stringContaining('31 Jan 2020') }
		});
	});
});

describe('a new implant', () => {
	const form = (driveDesign: string, fields: Record<string, string> = {}) => ({
		surgeryDate: '2026-03-01',
		surgeon: surgeon.personId,
		driveDesign,
		drive: '',
		massG: '',
		note: '',
		site: 'right dorsal CA1',
		bundles: 'T01-T16',
		screws: 'each',
		kind: 'tetrode',
		channels: '4',
		role: 'record',
		targetLayer: '',
		startDepthUm: '900',
		zero: 'dura',
		tiltDeg: '0',
		azimuthDeg: '0',
		entryPoints: '',
		layerBands: '',
		...fields
	});

	it('is refused to experimenters', async () => {
		const { code } = await makeAnimal();
		const visit = { params: { code }, actor: experimenter };
		expect(await answerTo(implant.load, visit)).toMatchObject({ status: 403 });
		const post = { ...visit, form: form('any') };
		expect(await answerTo(implant.actions.default, post)).toMatchObject({ status: 403 });
	});

	it('names the list whose words are not known, once for the whole block', async () => {
		const { name } = await makeDriveDesign();
		const { code } = await coverAnimal({ surgeon: surgeon.personId });
		const answer = await answerTo(implant.actions.default, {
			params: { code },
			actor: surgeon,
			form: form(name, { channels: 'four' })
		});
		expect(answer).toMatchObject({ status: 422 });
		expect(JSON.stringify(answer).match(/Give a number from 0 to 1024/g)).toHaveLength(1);
	});

	it('says what the protocol does not cover, and leads to the implant when it does', async () => {
		const { name } = await makeDriveDesign();
		const { code } = await makeAnimal();
		const post = (animal: string) =>
			answerTo(implant.actions.default, {
				params: { code: animal },
				actor: surgeon,
				form: form(name)
			});
		expect(await post(code)).toMatchObject({
			status: 409,
			data: { form: { errors: { _errors: [expect.stringContaining('no protocol')] } } }
		});
		const covered = await coverAnimal({ surgeon: surgeon.personId });
		expect(await post(covered.code)).toMatchObject({
			status: 303,
			location: `/animals/${covered.code}/implants/A`
		});
	});
});
