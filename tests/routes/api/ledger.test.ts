import { beforeAll, describe, expect, it } from 'vitest';
import {
	GET as day,
	PUT as putDay
} from '../../../src/routes/api/v1/animals/[code]/days/[date]/+server';
import { POST as implant } from '../../../src/routes/api/v1/animals/[code]/implants/+server';
import {
	GET as turns,
	POST as turn
} from '../../../src/routes/api/v1/animals/[code]/turns/+server';
import { makeAnimal } from '../../factories/animal';
import { makeDriveDesign } from '../../factories/drive-design';
import { makeImplant } from '../../factories/implant';
import { coverAnimal } from '../../server/implants/cover-animal';
import { call } from './call';
import { described } from './described';
import { makeToken } from './token';

const bundle = { label: 'T01', kind: 'tetrode', channels: 4, entryApMm: -3.8, entryMlMm: 2.5 };
const sites = [
	{
		label: 'right CA1',
		targetLayer: 'CA1 pyramidal',
		carriages: [{ label: 'C01', bundles: [{ ...bundle, startDepthUm: 500 }] }]
	}
];

describe('POST /api/v1/animals/{code}/implants', () => {
	const post = (code: string, token: string, body: object) =>
		call(implant, { method: 'POST', params: { code }, token, body });

	it('refuses an animal there is not, and a design there is not', async () => {
		const { token, personId } = await makeToken({ roles: ['surgeon'] });
		const body = { surgeryDate: '2026-03-01', driveDesign: 'none such', sites };
		expect((await post('NONE', token, body)).status).toBe(404);
		const { code } = await coverAnimal({ surgeon: personId });
		const answer = await post(code, token, body);
		expect(answer.status).toBe(422);
		const { issues } = await described('createImplant', answer);
		expect(issues[0].field).toBe('driveDesign');
	});

	it('names the place of a fault deep inside', async () => {
		const { token } = await makeToken({ roles: ['surgeon'] });
		const bad = structuredClone(sites);
		bad[0].carriages[0].bundles[0].kind = 'octrode';
		const answer = await post('R1', token, {
			surgeryDate: '2026-03-01',
			driveDesign: 'x',
			sites: bad
		});
		const { issues } = await described('createImplant', answer);
		expect(issues[0].field).toBe('sites[0].carriages[0].bundles[0].kind');
	});

	it('enters an implant on a design of the lab', async () => {
		const { token, personId } = await makeToken({ roles: ['surgeon'] });
		const { animal } = await coverAnimal({ surgeon: personId });
		const { name } = await makeDriveDesign();
		const answer = await post(animal.code, token, {
			surgeryDate: '2026-03-01',
			driveDesign: name,
			sites
		});
		expect(answer.status).toBe(201);
		expect(await described('createImplant', answer)).toMatchObject({
			animal: animal.code,
			letter: 'A',
			driveDesign: name,
			pitchUm: 317.5,
			sites: [{ carriages: [{ label: 'C01', bundles: [{ code: `${animal.code}-T01` }] }] }]
		});
	});

	it('takes a new design from a PI and from nobody else', async () => {
		const design = {
			name: 'Inline',
			thread: '',
			pitchUm: 250,
			travelMm: 6,
			smallestStepTurns: 0.125
		};
		const pi = await makeToken({ roles: ['pi'] });
		const { animal } = await coverAnimal({ surgeon: pi.personId });
		const body = { surgeryDate: '2026-03-01', driveDesign: design, sites };
		const surgeon = await makeToken({ roles: ['surgeon'] });
		const byPi = { ...body, surgeon: pi.personId };
		expect((await post(animal.code, surgeon.token, byPi)).status).toBe(403);
		const answer = await post(animal.code, pi.token, body);
		expect(await described('createImplant', answer)).toMatchObject({
			pitchUm: 250,
			travelUm: 6000
		});
	});
});

describe('turns', () => {
	let code: string;
	let token: string;
	const post = (body: object) => call(turn, { method: 'POST', params: { code }, token, body });

	beforeAll(async () => {
		const animal = await makeAnimal();
		({ code } = animal);
		await makeImplant({ animalId: animal.id, tetrodes: 2 });
		({ token } = await makeToken());
	});

	it('are refused for an animal or a carriage there is not', async () => {
		const none = await call(turn, {
			method: 'POST',
			params: { code: 'NONE' },
			token,
			body: { carriage: 'C01', turns: 1 }
		});
		expect(none.status).toBe(404);
		const answer = await post({ carriage: 'C99', turns: 1 });
		expect(answer.status).toBe(422);
		expect((await described('recordTurn', answer)).issues[0].field).toBe('carriage');
	});

	it('are refused beyond the travel of the screw', async () => {
		const answer = await post({ carriage: 'C01', turns: -1, doneAt: '2026-03-03T10:00:00+01:00' });
		expect(answer.status).toBe(409);
		expect(await described('recordTurn', answer)).toMatchObject({ code: 'beyond-travel' });
	});

	it('need a moment with its offset', async () => {
		const answer = await post({ carriage: 'C01', turns: 1, doneAt: '2026-03-03T10:00:00' });
		expect((await described('recordTurn', answer)).issues[0].field).toBe('doneAt');
	});

	it('answer where the carriage stands', async () => {
		const answer = await post({ carriage: 'C01', turns: 1, doneAt: '2026-03-03T10:00:00+01:00' });
		expect(answer.status).toBe(201);
		expect(await described('recordTurn', answer)).toMatchObject({
			carriage: 'C01',
			doneAt: '2026-03-03T09:00:00.000Z',
			turns: 1,
			screwUm: 317.5,
			depthUm: 317.5,
			travelLeftUm: 5000 - 317.5,
			isEnteredLater: true
		});
	});

	it('are corrected by a row that replaces the wrong one', async () => {
		const wrong = await (
			await post({ carriage: 'C02', turns: 2, doneAt: '2026-03-04T10:00:00Z' })
		).json();
		const right = await post({ turns: 0.5, replaces: wrong.id, reason: 'half a turn, not two' });
		expect(await described('recordTurn', right)).toMatchObject({
			carriage: 'C02',
			screwUm: 158.75,
			replaces: wrong.id
		});
		const asked = { token, params: { code }, path: '/?carriage=C02&limit=1' };
		const first = await described('listTurns', await call(turns, asked));
		const rest = await described(
			'listTurns',
			await call(turns, { ...asked, path: `/?carriage=C02&cursor=${first.nextCursor}` })
		);
		const rows = [...first.items, ...rest.items];
		expect(rows).toHaveLength(2);
		expect(rows.find(({ id }) => id === wrong.id)).toMatchObject({ stand: null });
	});
});

describe('days', () => {
	let code: string;
	let token: string;
	const date = '2026-03-05';
	const takenAt = '2026-03-05T12:00:00Z';
	const get = () => call(day, { token, params: { code, date } });
	const put = (body: object, headers = {}) =>
		call(putDay, { method: 'PUT', token, params: { code, date }, body, headers });

	beforeAll(async () => {
		const animal = await makeAnimal();
		({ code } = animal);
		await makeImplant({ animalId: animal.id, tetrodes: 2 });
		({ token } = await makeToken());
	});

	it('are not there before something is written', async () => {
		const answer = await get();
		expect(answer.status).toBe(404);
		await described('getDay', answer);
		const noDate = await call(day, { token, params: { code, date: 'yesterday' } });
		expect(noDate.status).toBe(404);
	});

	it('refuse counts that cannot be, naming the row', async () => {
		const counts = [
			{ bundle: 'T01', principal: 3 },
			{ bundle: 'T02', principal: 2.5 }
		];
		const answer = await put({ tallies: counts });
		expect(answer.status).toBe(422);
		const { issues } = await described('putDay', answer);
		expect(issues[0].field).toBe('tallies[1].principal');
		expect((await get()).status).toBe(404);
	});

	it('are not signed by this call', async () => {
		const answer = await put({ state: 'signed', tallies: [{ bundle: 'T01', principal: 3 }] });
		expect((await described('putDay', answer)).issues[0].field).toBe('state');
	});

	it('keep counts, and tell blank from zero', async () => {
		const answer = await put({
			tallies: [{ bundle: 'T01', takenAt, principal: 0, noiseUv: 12.5 }]
		});
		expect(answer.status).toBe(200);
		const body = await described('putDay', answer);
		expect(body).toMatchObject({ animal: code, date, state: 'draft', entry: null });
		expect(body.tallies[0]).toMatchObject({ bundle: 'T01', principal: 0, interneuron: null });
		expect(await described('getDay', await get())).toEqual(body);
	});

	it('can be sent again unchanged, as they were read', async () => {
		const before = await get();
		const answer = await put(await before.json());
		expect(answer.status).toBe(200);
		expect(answer.headers.get('etag')).toBe(before.headers.get('etag'));
	});

	it('refuse a change made on an older reading', async () => {
		const etag = (await get()).headers.get('etag') ?? '';
		const second = { tallies: [{ bundle: 'T02', takenAt, principal: 4 }] };
		expect((await put(second, { 'if-match': etag })).status).toBe(200);
		const third = { tallies: [{ bundle: 'T02', takenAt, principal: 5, why: 'counted again' }] };
		const late = await put(third, { 'if-match': etag });
		expect(late.status).toBe(412);
		expect(await described('putDay', late)).toMatchObject({ code: 'precondition-failed' });
		const fresh = (await get()).headers.get('etag') ?? '';
		expect((await put(third, { 'if-match': fresh })).status).toBe(200);
	});

	it('never overwrite a count without a reason', async () => {
		const answer = await put({ tallies: [{ bundle: 'T02', takenAt, principal: 9 }] });
		expect(answer.status).toBe(409);
		expect(await described('putDay', answer)).toMatchObject({ code: 'already-counted' });
	});
});
