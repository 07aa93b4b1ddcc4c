import { isActionFailure, isHttpError, isRedirect, type RequestEvent } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { Invitation } from '$lib/server/models/invitation';
import { Person } from '$lib/server/models/person';
import { actorOf, makeActor } from '../factories/actor';
import { makePerson } from '../factories/person';
import { nextNumber } from '../factories/sequence';
import { actions as membersActions } from '../../src/routes/(lab)/lab/members/+page.server';
import { actions as profileActions } from '../../src/routes/(lab)/profile/+page.server';
import {
	actions as signInActions,
	load as signInLoad
} from '../../src/routes/(auth)/sign-in/+page.server';
import { pageEvent, type Visit } from './page-event';

type Action = (event: never) => unknown;

async function run(action: Action | undefined, event: RequestEvent): Promise<unknown> {
	if (!action) throw new Error('There is no such action');
	try {
		return await action(event as never);
	} catch (thrown) {
		return thrown;
	}
}

const submit = (action: Action | undefined, visit: Visit) => run(action, pageEvent(visit));

const PASSWORD = 'lowering slowly';
const address = () => `10.6.0.${nextNumber()}`;

describe('the sign-in form', () => {
	it('sets the cookie and leads on, within this site only', async () => {
		const { email } = await makePerson({ password: PASSWORD });
		const places = { '/animals/R031?day=3': '/animals/R031?day=3', '//elsewhere.example': '/' };
		for (const [next, led] of Object.entries(places)) {
			const event = pageEvent<RequestEvent>({
				form: { email: email.toUpperCase(), password: PASSWORD, next },
				address: address()
			});
			const answer = await run(signInActions.default, event);
			expect(isRedirect(answer) && answer.location).toBe(led);
			expect(event.cookies.get('quarterturn_session')).toMatch(/^\w{20,}$/);
		}
	});

	it('comes back with the address kept and the password gone', async () => {
		const { email } = await makePerson({ password: PASSWORD });
		const answer = await submit(signInActions.default, {
			form: { email, password: 'not this one', next: '/' },
			address: address()
		});
		expect(isActionFailure(answer) && answer.status).toBe(422);
		const text = JSON.stringify(answer);
		expect(text).toContain(email);
		expect(text).toContain('The mail address or the password is not right.');
		expect(text).not.toContain('not this one');
	});

	it('says how long to wait once the tries are used up', async () => {
		const form = { email: 'nobody@lab.example', password: 'x', next: '/' };
		for (let i = 0; i < 10; i += 1) {
			await submit(signInActions.default, { form, address: address() });
		}
		const answer = await submit(signInActions.default, { form, address: address() });
		expect(isActionFailure(answer) && answer.status).toBe(429);
		expect(JSON.stringify(answer)).toMatch(/Wait 1[45] min/);
	});

	it('is passed by for somebody who is signed in', async () => {
		const actor = await makeActor('observer');
		const event = pageEvent({ path: '/sign-in?next=%2Fanimals', actor });
		const answer = await run(signInLoad as Action, event);
		expect(isRedirect(answer) && answer.location).toBe('/animals');
	});
});

describe('the members page', () => {
	it('invites with several roles from a plain form', async () => {
		const actor = await makeActor('pi');
		const email = `form${nextNumber()}@lab.example`;
		const request = new Request('http://localhost/lab/members?/invite', {
			method: 'POST',
			body: new URLSearchParams([
				['name', 'Nina New'],
				['email', email],
				['roles', 'surgeon'],
				['roles', 'experimenter']
			])
		});
		const event = { ...pageEvent<RequestEvent>({ actor }), request };
		expect(await run(membersActions.invite, event)).toMatchObject({
			done: `An invitation to ${email} is on its way.`
		});
		const made = await Invitation.findOne({ where: { email } });
		expect(made?.roles).toEqual(['surgeon', 'experimenter']);
	});

	it('asks for a role beside the roles, keeping what was typed', async () => {
		const answer = await submit(membersActions.invite, {
			actor: await makeActor('pi'),
			form: { name: 'Nina', email: 'n@lab.example' }
		});
		expect(answer).toMatchObject({
			status: 422,
			data: {
				form: {
					data: { name: 'Nina', email: 'n@lab.example' },
					errors: { roles: { _errors: ['Choose at least one role.'] } }
				}
			}
		});
	});

	it('is no way round permissions: an observer’s posts are refused', async () => {
		const actor = await makeActor('observer');
		const person = await makePerson();
		const form = { personId: person.id, role: 'observer', isBlinded: 'true', id: person.id };
		for (const name of ['grant', 'revoke', 'blind', 'deactivate', 'reactivate', 'withdraw']) {
			const answer = await submit(membersActions[name], { actor, form });
			expect(isHttpError(answer) && answer.status).toBe(403);
		}
		expect((await Person.findByPk(person.id))?.deactivatedAt).toBeNull();
	});

	it('says in words why a change was refused', async () => {
		const actor = await makeActor('pi');
		const person = await makePerson({ roles: ['surgeon'] });
		const form = { personId: person.id, role: 'surgeon' };
		const answer = await submit(membersActions.grant, { actor, form });
		expect(answer).toMatchObject({
			status: 409,
			data: { refusal: 'This person has the role already.' }
		});
	});
});

describe('the profile page', () => {
	it('puts a refused password change beside its field, and sends no password back', async () => {
		const person = await makePerson({ password: PASSWORD });
		const answer = await submit(profileActions.password, {
			actor: actorOf(person, ['experimenter']),
			form: {
				currentPassword: 'a wrong one',
				password: 'slowly lowering',
				passwordAgain: 'slowly lowering'
			}
		});
		expect(answer).toMatchObject({
			status: 422,
			data: { form: { errors: { currentPassword: ['This is not your password.'] } } }
		});
		expect(JSON.stringify(answer)).not.toMatch(/a wrong one|slowly lowering/);
	});

	it('shows a new token in the answer to the form that made it', async () => {
		const answer = await submit(profileActions.makeToken, {
			actor: await makeActor('experimenter'),
			form: { name: 'rig', scope: 'read', days: '7' }
		});
		expect(answer).toMatchObject({ freshToken: { secret: expect.stringMatching(/^qt_/) } });
	});
});
