import { beforeEach, describe, expect, it } from 'vitest';
import { Conflict, Forbidden, Invalid, NotFound, Stale, Unauthenticated } from '$lib/server/errors';
import { Day } from '$lib/server/models/day';
import { Epoch } from '$lib/server/models/epoch';
import { Sorting } from '$lib/server/models/sorting';
import { Unit } from '$lib/server/models/unit';
import * as analyses from '$lib/server/services/analyses';
import * as sessions from '$lib/server/services/sessions';
import * as sortings from '$lib/server/services/sortings';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeArena } from '../../factories/arena';
import { makeImplant } from '../../factories/implant';
import { makePerson } from '../../factories/person';
import { makeRig } from '../../factories/rig';
import { logOf } from './log-of';
import { makeBench, send, spikes, walk, type Bench, type Person } from './lab';

let by: Person;
let animal: string;
let arena: string;

beforeEach(async () => {
	by = await makeActor('experimenter');
	animal = (await makeAnimal()).code;
	arena = (await makeArena()).name;
});

const run = (fields = {}) => ({ name: 'run', kind: 'run', startS: 0, stopS: 600, ...fields });

describe('who may do what with sessions', () => {
	const input = { startsAt: '2026-04-09T10:00:00Z' };

	it('a stranger may nothing, an observer may read and not write', async () => {
		await expect(sessions.create(null, animal, input)).rejects.toThrow(Unauthenticated);
		const observer = await makeActor('observer');
		await expect(sessions.create(observer, animal, input)).rejects.toThrow(Forbidden);
		const { id } = await sessions.create(by, animal, input);
		expect(await sessions.get(observer, id)).toMatchObject({ id, animal });
		await expect(sessions.edit(observer, id, input)).rejects.toThrow(Forbidden);
		await expect(sessions.reassign(observer, id, {})).rejects.toThrow(Forbidden);
		await expect(sessions.withdraw(observer, id, { why: 'x' })).rejects.toThrow(Forbidden);
		await expect(analyses.request(observer, id)).rejects.toThrow(Forbidden);
	});

	it('welfare and admins see no recordings', async () => {
		const { id } = await sessions.create(by, animal, input);
		for (const role of ['welfare', 'admin'] as const) {
			const reader = await makeActor(role);
			await expect(sessions.get(reader, id)).rejects.toThrow(Forbidden);
			await expect(sessions.list(reader, { animal })).rejects.toThrow(Forbidden);
		}
	});

	it('is not found under another animal’s code, nor under what is no id', async () => {
		const { id } = await sessions.create(by, animal, input);
		const other = (await makeAnimal()).code;
		await expect(sessions.get(by, id, { animal: other })).rejects.toThrow(NotFound);
		await expect(sessions.get(by, 'nonsense')).rejects.toThrow(NotFound);
	});
});

describe('a new session', () => {
	it('falls on the lab day of its start: before 04:00 on the day before', async () => {
		const day = async (startsAt: string) => (await sessions.create(by, animal, { startsAt })).day;
		expect(await day('2026-04-09T03:59:00Z')).toBe('2026-04-08');
		expect(await day('2026-04-09T04:00:00Z')).toBe('2026-04-09');
	});

	it('takes another lab day when it is told', async () => {
		const given = { startsAt: '2026-04-09T03:00:00Z', day: '2026-04-09' };
		expect((await sessions.create(by, animal, given)).day).toBe('2026-04-09');
	});

	it('copies the settings of its rig, except those given', async () => {
		const rig = await makeRig({ reference: 'skull screw', gain: '192' });
		const { id } = await sessions.create(by, animal, {
			startsAt: '2026-04-09T10:00:00Z',
			rig: rig.name,
			rigSettings: { gain: '1000' }
		});
		const before = await sessions.get(by, id);
		expect(before.rigSettings).toMatchObject({ reference: 'skull screw', gain: '1000' });
		await rig.update({ reference: 'cerebellum' });
		expect((await sessions.get(by, id)).rigSettings.reference).toBe('skull screw');
	});

	it('gives run epochs its arena where they name none', async () => {
		const other = (await makeArena()).name;
		const { id } = await sessions.create(by, animal, {
			startsAt: '2026-04-09T10:00:00Z',
			arena,
			epochs: [
				run({ name: 'field', startS: 700, stopS: 900, arena: other }),
				run(),
				run({ name: 'rest', kind: 'rest', startS: 600, stopS: 700 })
			]
		});
		const { epochs } = await sessions.get(by, id);
		expect(epochs.map(({ name, arenaName }) => [name, arenaName])).toEqual([
			['run', arena],
			['rest', null],
			['field', other]
		]);
	});

	it.each([
		[
			'overlapping epochs',
			[run(), run({ name: 'b', startS: 599, stopS: 700 })],
			'epochs[1].startS'
		],
		['the same name twice', [run(), run({ startS: 700, stopS: 800 })], 'epochs[1].name'],
		['an epoch that ends before it starts', [run({ startS: 700 })], 'epochs[0].stopS'],
		['an unknown arena', [run({ arena: 'nowhere' })], 'epochs[0].arena'],
		['an epoch that is no time', [run({ stopS: Number.NaN })], 'epochs[0].stopS']
	])('is refused with %s, naming the field', async (_name, epochs, field) => {
		const made = sessions.create(by, animal, { startsAt: '2026-04-09T10:00:00Z', arena, epochs });
		const fault = await made.catch((thrown: unknown) => thrown);
		expect(fault).toBeInstanceOf(Invalid);
		expect(fault).toMatchObject({ issues: [{ field }] });
		expect(await sessions.list(by, { animal })).toEqual([]);
	});

	it('needs an arena for a run epoch', async () => {
		const made = sessions.create(by, animal, {
			startsAt: '2026-04-09T10:00:00Z',
			epochs: [run()]
		});
		await expect(made).rejects.toThrow('A run epoch needs its arena.');
	});
});

describe('editing a session', () => {
	const input = { startsAt: '2026-04-09T10:00:00Z' };

	it('keeps the epochs there were, as withdrawn', async () => {
		const { id } = await sessions.create(by, animal, { ...input, arena, epochs: [run()] });
		await sessions.edit(by, id, { ...input, arena, epochs: [run({ stopS: 500 })], revision: 0 });
		const { epochs, revision } = await sessions.get(by, id);
		expect(epochs).toMatchObject([{ name: 'run', stopS: 500 }]);
		expect(revision).toBe(1);
		expect(await Epoch.count({ where: { sessionId: id } })).toBe(2);
	});

	it('refuses a stale form and overwrites nothing', async () => {
		const { id } = await sessions.create(by, animal, input);
		await sessions.edit(by, id, { ...input, note: 'first', revision: 0 });
		await expect(sessions.edit(by, id, { ...input, note: 'second', revision: 0 })).rejects.toThrow(
			Stale
		);
		expect((await sessions.get(by, id)).note).toBe('first');
	});

	it('moves it to another lab day until the day is signed', async () => {
		const { id } = await sessions.create(by, animal, input);
		await sessions.edit(by, id, { ...input, day: '2026-04-08', revision: 0 });
		const moved = await sessions.get(by, id);
		expect(moved.day).toBe('2026-04-08');
		await Day.update(
			{ state: 'signed', responsibleId: by.personId },
			{ where: { date: '2026-04-08' } }
		);
		await expect(
			sessions.edit(by, id, { ...input, day: '2026-04-07', revision: 1 })
		).rejects.toThrow(/signed/);
	});
});

describe('a session on the wrong animal', () => {
	let bench: Bench;

	beforeEach(async () => {
		bench = await makeBench();
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
	});

	it('moves with its sortings and units, and the log says who, whereto and why', async () => {
		const right = await makeAnimal();
		const { bundles } = await makeImplant({ animalId: right.id, surgeryDay: '2026-02-01' });
		await sessions.reassign(bench.by, bench.sessionId, { animal: right.code, why: 'mistyped' });
		const session = await sessions.get(bench.by, bench.sessionId);
		expect(session).toMatchObject({ animal: right.code, day: '2026-03-02' });
		const [sorting] = await sortings.list(bench.by, bench.sessionId);
		expect(await Sorting.findByPk(sorting.id)).toMatchObject({ animalId: right.id });
		const unit = await Unit.findOne({ where: { sortingId: sorting.id, label: '1' } });
		expect(unit?.bundleId).toBe(bundles.find(({ label }) => label === 'T01')?.id ?? null);
		expect(await logOf('session', bench.sessionId)).toContainEqual(
			expect.objectContaining({
				action: 'session.reassign',
				personId: bench.by.personId,
				detail: expect.objectContaining({ to: right.code, why: 'mistyped' })
			})
		);
	});

	it('stays when the day is signed', async () => {
		const { dayId } = await Sorting.findOne({
			rejectOnEmpty: true,
			order: [['createdAt', 'DESC']]
		});
		await Day.update(
			{ state: 'signed', responsibleId: bench.by.personId },
			{ where: { id: dayId } }
		);
		const right = await makeAnimal();
		await expect(
			sessions.reassign(bench.by, bench.sessionId, { animal: right.code, why: 'mistyped' })
		).rejects.toThrow(Conflict);
		expect((await sessions.get(bench.by, bench.sessionId)).animal).toBe(bench.animal);
	});

	it('stays when a sorting covers another session too', async () => {
		const { id: other } = await sessions.create(bench.by, bench.animal, {
			startsAt: '2026-03-02T12:00:00Z'
		});
		await sortings.create(bench.by, bench.animal, { sessions: [bench.sessionId, other] });
		const right = await makeAnimal();
		await expect(
			sessions.reassign(bench.by, bench.sessionId, { animal: right.code, why: 'mistyped' })
		).rejects.toThrow(/covers other sessions/);
	});

	it.each([
		['an unknown code', 'NOBODY', /no animal NOBODY/],
		['its own animal', null, /belongs to .* already/]
	])('is not moved to %s', async (_name, code, message) => {
		const moved = sessions.reassign(bench.by, bench.sessionId, {
			animal: code ?? bench.animal,
			why: 'x'
		});
		await expect(moved).rejects.toThrow(message);
	});
});

describe('a withdrawn session', () => {
	it('leaves the list, keeps its reason and takes nothing any more', async () => {
		const bench = await makeBench();
		await sessions.withdraw(bench.by, bench.sessionId, { why: 'a test of the cable' });
		expect(await sessions.list(bench.by, { animal: bench.animal })).toEqual([]);
		const view = await sessions.get(bench.by, bench.sessionId);
		expect(view.withdrawn?.why).toBe('a test of the cable');
		await expect(send(bench, 'position', walk())).rejects.toThrow(/withdrawn/);
		await expect(analyses.request(bench.by, bench.sessionId)).rejects.toThrow(/withdrawn/);
	});

	it('needs a reason', async () => {
		const bench = await makeBench();
		await expect(sessions.withdraw(bench.by, bench.sessionId, { why: ' ' })).rejects.toThrow(
			Invalid
		);
	});
});

describe('a sorting', () => {
	it('is added by each file of spikes; a superseded one is current no more', async () => {
		const bench = await makeBench();
		await send(bench, 'spikes', spikes());
		const [first] = await sortings.list(bench.by, bench.sessionId);
		const sorter = await makePerson({ name: 'A. Sorter' });
		await send(bench, 'spikes', spikes(100), 'again.csv', {
			sorting: { supersedes: first.id, personId: sorter.id, program: 'by hand' }
		});
		const [second, old] = await sortings.list(bench.by, bench.sessionId);
		expect(second).toMatchObject({ person: 'A. Sorter', program: 'by hand', isCurrent: true });
		expect(old).toMatchObject({ id: first.id, isCurrent: false, withdrawn: null });
	});

	it('announced for two sessions takes its spikes once', async () => {
		const bench = await makeBench();
		const { id: other } = await sessions.create(bench.by, bench.animal, {
			startsAt: '2026-03-02T12:00:00Z'
		});
		const { id } = await sortings.create(bench.by, bench.animal, {
			sessions: [bench.sessionId, other]
		});
		await send(bench, 'spikes', spikes(), 'both.csv', { sortingId: id });
		expect(await sortings.list(bench.by, other)).toMatchObject([{ id, units: 2, alsoCovers: 1 }]);
		await expect(send(bench, 'spikes', spikes(90), 'more.csv', { sortingId: id })).rejects.toThrow(
			/has its spikes already/
		);
	});

	it('learns class, amplitude and bundle of its units from a table', async () => {
		const bench = await makeBench();
		const table = 'unit,bundle,class,amplitude_uv\n1,T01,principal,180\n9,T09,unclear,\n';
		await expect(send(bench, 'units', table)).rejects.toThrow(/spikes first/);
		await send(bench, 'spikes', spikes());
		const file = await send(bench, 'units', table);
		expect(file.warnings.join(' ')).toMatch(/no such unit.*: 9\. Nothing is said of units 2\./);
		const unit = await Unit.findOne({ where: { label: '1', class: 'principal' } });
		expect(Number(unit?.amplitudeUv)).toBe(180);
		const other = await makeBench();
		await send(other, 'spikes', spikes().replace(/,T0\d|,bundle/g, ''));
		await send(other, 'units', 'unit,bundle\n1,T01\n2,T02\n2,T03\n');
		const [{ id }] = await sortings.list(other.by, other.sessionId);
		const labels = await Unit.findAll({ where: { sortingId: id }, order: ['label'] });
		expect(labels.map(({ bundleLabel }) => bundleLabel)).toEqual(['T01', null]);
	});
});

describe('an analysis', () => {
	it('is asked for by itself once positions and spikes are there, with the arena’s bins', async () => {
		const bench = await makeBench();
		await send(bench, 'spikes', spikes());
		expect(await analyses.list(bench.by, bench.sessionId)).toEqual([]);
		await send(bench, 'position', walk());
		const [{ id }] = await analyses.list(bench.by, bench.sessionId);
		const view = await analyses.get(bench.by, id);
		expect(view).toMatchObject({ state: 'queued', result: null });
		expect(view.parameters).toMatchObject({ arena: 'straight:100', binCm: 5, shuffles: 500 });
	});

	it('asked for again with the same inputs and parameters is the one that is there', async () => {
		const bench = await makeBench();
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		const [{ id }] = await analyses.list(bench.by, bench.sessionId);
		expect(await analyses.request(bench.by, bench.sessionId)).toEqual({ id, state: 'queued' });
		await send(bench, 'units', 'unit,class\n1,principal\n');
		const again = await analyses.request(bench.by, bench.sessionId);
		expect(again.id, 'units were described since').not.toBe(id);
	});

	it('with other parameters is another row; the wrong ones name their field', async () => {
		const bench = await makeBench();
		await expect(analyses.request(bench.by, bench.sessionId)).rejects.toThrow(/no positions yet/);
		await send(bench, 'position', walk());
		await expect(analyses.request(bench.by, bench.sessionId)).rejects.toThrow(/no sorted spikes/);
		await send(bench, 'spikes', spikes());
		const { id } = await analyses.request(bench.by, bench.sessionId, { binCm: 2 });
		expect((await analyses.get(bench.by, id)).parameters.binCm).toBe(2);
		expect(await analyses.list(bench.by, bench.sessionId)).toHaveLength(2);
		for (const [wrong, field] of [
			[{ binCm: 0 }, 'binCm'],
			[{ folds: 2.5 }, 'folds'],
			[{ prior: 'flat' }, 'prior'],
			[{ arena: 'nowhere' }, 'arena']
		] as const) {
			const fault = await analyses
				.request(bench.by, bench.sessionId, wrong)
				.catch((thrown: unknown) => thrown);
			expect(fault).toMatchObject({ issues: [{ field }] });
		}
	});

	it('waits for an arena where the session names none', async () => {
		const { id: sessionId } = await sessions.create(by, animal, {
			startsAt: '2026-04-09T10:00:00Z'
		});
		const bench = { by, animal, sessionId };
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		expect(await analyses.list(by, sessionId)).toEqual([]);
		await expect(analyses.request(by, sessionId)).rejects.toThrow(/where the animal ran/);
	});
});
