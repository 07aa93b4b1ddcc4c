import { describe, expect, it } from 'vitest';
import { GET as one } from '../../../src/routes/api/v1/animals/[code]/+server';
import { GET as list, POST as create } from '../../../src/routes/api/v1/animals/+server';
import { GET as people } from '../../../src/routes/api/v1/people/+server';
import { makeAnimal } from '../../factories/animal';
import { makePerson } from '../../factories/person';
import { makeProtocol } from '../../factories/protocol';
import { call } from './call';
import { described } from './described';
import { makeToken } from './token';

const rat = { code: 'A001', species: 'rat', sex: 'female', strain: 'Lister hooded' };

async function post(body: object, token?: string) {
	const by = token ?? (await makeToken()).token;
	return call(create, { method: 'POST', path: '/api/v1/animals', token: by, body });
}

describe('POST /api/v1/animals', () => {
	it('refuses fields that are wrong or unknown, naming each', async () => {
		const answer = await post({ code: 'R 1', species: 'cat', sex: 'male', weight: 300 });
		expect(answer.status).toBe(422);
		const { issues } = await described('createAnimal', answer);
		expect(issues.map(({ field }: { field: string }) => field)).toEqual(['code', 'species', '']);
		expect(issues[2].message).toContain('weight');
	});

	it('refuses a code that is taken, in whatever letter case', async () => {
		await makeAnimal({ code: 'B001' });
		const answer = await post({ ...rat, code: 'b001' });
		expect(answer.status).toBe(409);
		expect(await described('createAnimal', answer)).toMatchObject({ code: 'code-taken' });
	});

	it('adds an animal on a protocol and tells where it is', async () => {
		const { number } = await makeProtocol();
		const body = { ...rat, code: 'C001', protocol: number, baselineWeightG: 310.5 };
		const answer = await post(body);
		expect(answer.status).toBe(201);
		expect(answer.headers.get('location')).toBe('/api/v1/animals/C001');
		expect(await described('createAnimal', answer)).toMatchObject({
			...body,
			status: 'in-lab',
			birthDate: null,
			isSimulated: false
		});
	});

	it('adds one animal however often the same request comes', async () => {
		const { token } = await makeToken();
		const send = () =>
			call(create, {
				method: 'POST',
				token,
				headers: { 'idempotency-key': 'add-d001' },
				body: { ...rat, code: 'D001' }
			});
		const [first, again] = await Promise.all([send(), send()]);
		expect([first.status, again.status]).toEqual([201, 201]);
		expect(await again.text()).toBe(await first.text());
	});
});

describe('GET /api/v1/animals', () => {
	it('gives pages in order of the codes, and of one status when asked', async () => {
		for (const code of ['Z3', 'Z1', 'Z2']) await makeAnimal({ code, status: 'expected' });
		const { token } = await makeToken({ roles: ['observer'], scope: 'read' });
		const first = await described(
			'listAnimals',
			await call(list, { token, path: '/?status=expected&limit=2' })
		);
		expect(first.items.map(({ code }: { code: string }) => code)).toEqual(['Z1', 'Z2']);
		const rest = await described(
			'listAnimals',
			await call(list, { token, path: `/?status=expected&cursor=${first.nextCursor}` })
		);
		expect(rest.items.map(({ code }: { code: string }) => code)).toEqual(['Z3']);
		expect(rest.nextCursor).toBeNull();
	});

	it('refuses a status there is not', async () => {
		const { token } = await makeToken();
		const answer = await call(list, { token, path: '/?status=asleep' });
		expect(answer.status).toBe(400);
		await described('listAnimals', answer);
	});
});

describe('GET /api/v1/animals/{code}', () => {
	it('says 404 for an animal there is not', async () => {
		const { token } = await makeToken();
		const answer = await call(one, { token, params: { code: 'NONE' } });
		expect(answer.status).toBe(404);
		await described('getAnimal', answer);
	});

	it('gives an animal by its code', async () => {
		const { code } = await makeAnimal();
		const { token } = await makeToken({ roles: ['observer'] });
		const answer = await call(one, { token, params: { code: code.toLowerCase() } });
		expect(await described('getAnimal', answer)).toMatchObject({ code, baselineWeightG: 400 });
	});
});

describe('GET /api/v1/people', () => {
	it('lists active people by name and tells nothing else of them', async () => {
		const here = await makePerson({ name: 'Ann Other' });
		await makePerson({ name: 'Gone Away', deactivatedAt: new Date() });
		const { token } = await makeToken({ roles: ['observer'], scope: 'read' });
		const { items } = await described('listPeople', await call(people, { token }));
		expect(items).toContainEqual({ id: here.id, name: 'Ann Other' });
		expect(JSON.stringify(items)).not.toContain('Gone Away');
	});
});
