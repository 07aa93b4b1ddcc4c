import { beforeAll, describe, expect, it } from 'vitest';
import * as registers from '$lib/server/services/registers';
import { makeActor } from '../factories/actor';
import { makeArena } from '../factories/arena';
import { makePerson } from '../factories/person';
import * as list from '../../src/routes/(lab)/lab/[register=register]/+page.server';
import * as row from '../../src/routes/(lab)/lab/[register=register]/[id=id]/+page.server';
import * as fresh from '../../src/routes/(lab)/lab/[register=register]/new/+page.server';
import { answerTo } from './run-action';

type Made = Awaited<ReturnType<typeof makeActor>>;

let pi: Made;
let observer: Made;

beforeAll(async () => {
	[pi, observer] = await Promise.all([makeActor('pi'), makeActor('observer')]);
});

const params = { register: 'arenas' };
const form = (fields: Record<string, string> = {}) => ({
	name: 'Long track',
	description: 'straight:300',
	binCm: '5',
	pxPerCm: '',
	endAX: '',
	endAY: '',
	endBX: '',
	endBY: '',
	note: '',
	revision: '0',
	...fields
});

describe('list of a register', () => {
	it('shows withdrawn rows only when asked', async () => {
		const arena = await makeArena();
		await registers.withdraw(pi, 'arenas', arena.id, 'Broken up');
		const names = async (path: string) => {
			const answer = await answerTo(list.load, { path, params, actor: observer });
			return JSON.stringify(answer);
		};
		expect(await names('/lab/arenas')).not.toContain(arena.name);
		expect(await names('/lab/arenas?withdrawn')).toContain(arena.name);
	});
});

describe('form of a new row', () => {
	it('is closed to observers, for reading and for posting', async () => {
		const visit = { params, actor: observer };
		expect(await answerTo(fresh.load, visit)).toMatchObject({ status: 403 });
		expect(await answerTo(fresh.actions.default, { ...visit, form: form() })).toMatchObject({
			status: 403
		});
	});

	it('starts with figures empty rather than 0', async () => {
		const answer = await answerTo(fresh.load, { params: { register: 'protocols' }, actor: pi });
		expect(answer).toMatchObject({ form: { data: { animalsAllowed: null }, errors: {} } });
	});

	it('comes back with the fault beside its field and everything typed', async () => {
		const answer = await answerTo(fresh.actions.default, {
			params,
			actor: pi,
			form: form({ description: 'maze:3', note: 'by the window' })
		});
		expect(answer).toMatchObject({
			status: 422,
			data: {
				form: {
					data: { description: 'maze:3', note: 'by the window' },
					errors: { description: [expect.stringContaining('maze:3')] }
				}
			}
		});
	});

	it('refuses a blank figure instead of taking it for 0', async () => {
		const answer = await answerTo(fresh.actions.default, {
			params,
			actor: pi,
			form: form({ binCm: '' })
		});
		expect(answer).toMatchObject({
			status: 422,
			data: { form: { errors: { binCm: [expect.any(String)] } } }
		});
	});

	it('leads to the list once the row is kept, and says when the name is taken', async () => {
		const post = () => answerTo(fresh.actions.default, { params, actor: pi, form: form() });
		expect(await post()).toMatchObject({ status: 303, location: '/lab/arenas' });
		expect(await post()).toMatchObject({
			status: 409,
			data: { form: { errors: { _errors: ['An arena of this name exists.'] } } }
		});
	});
});

describe('form of a row', () => {
	it('is not there for an unknown id', async () => {
		const id = '01890a5d-ac96-774b-bcce-b302099a8057';
		const answer = await answerTo(row.load, { params: { ...params, id }, actor: observer });
		expect(answer).toMatchObject({ status: 404 });
	});

	it('opens for observers and refuses what they post', async () => {
		const { id } = await makeArena();
		const visit = { params: { ...params, id }, actor: observer };
		expect(await answerTo(row.load, visit)).toMatchObject({ canWrite: false });
		for (const [action, sent] of [
			['edit', form()],
			['withdraw', { why: 'because' }],
			['restore', { id }]
		] as const) {
			expect(await answerTo(row.actions[action], { ...visit, form: sent })).toMatchObject({
				status: 403
			});
		}
	});

	it('overwrites nothing when the row was changed meanwhile, and keeps what was typed', async () => {
		const { id, name } = await makeArena();
		const visit = { params: { ...params, id }, actor: pi };
		const post = (note: string) =>
			answerTo(row.actions.edit, { ...visit, form: form({ name, note }) });
		expect(await post('first')).toMatchObject({ status: 303 });
		expect(await post('second')).toMatchObject({
			status: 409,
			data: {
				form: {
					data: { note: 'second' },
					errors: { _errors: [expect.stringContaining('Nothing was overwritten')] }
				}
			}
		});
		expect((await registers.get(pi, 'arenas', id)).values.note).toBe('first');
	});

	it('withdraws with a reason only', async () => {
		const { id } = await makeArena();
		const visit = { params: { ...params, id }, actor: pi };
		expect(await answerTo(row.actions.withdraw, { ...visit, form: { why: ' ' } })).toMatchObject({
			status: 422,
			data: { refusal: expect.stringContaining('Say why') }
		});
		expect(await answerTo(row.actions.withdraw, { ...visit, form: { why: 'Sold' } })).toMatchObject(
			{
				done: expect.any(String)
			}
		);
	});

	it('unchecks the last named person of a protocol', async () => {
		const person = await makePerson();
		const { id } = await registers.create(pi, 'protocols', {
			number: 'F-1',
			title: 'T',
			animalsAllowed: 3,
			surgeriesAllowed: 1,
			restriction: 'none',
			weightFloorPercent: 80,
			longestImplantDays: null,
			expiresOn: '2099-01-01',
			people: [person.id]
		});
		const answer = await answerTo(row.actions.edit, {
			params: { register: 'protocols', id },
			actor: pi,
			form: {
				number: 'F-1',
				title: 'T',
				animalsAllowed: '3',
				surgeriesAllowed: '1',
				restriction: 'none',
				weightFloorPercent: '80',
				longestImplantDays: '',
				endPoints: '',
				expiresOn: '2099-01-01',
				revision: '0'
			}
		});
		expect(answer).toMatchObject({ status: 303 });
		expect((await registers.get(pi, 'protocols', id)).values.people).toEqual([]);
	});
});
