import { describe, expect, it } from 'vitest';
import { ROLES, type Role } from '$lib/schemas/roles';
import { demand, may, PERMISSIONS, systemActor, type Actor, type Permission } from './access';
import { Forbidden, Unauthenticated } from './errors';

function actor(roles: readonly Role[], fields: Partial<Actor> = {}): Actor {
	return {
		personId: '01890000-0000-7000-8000-000000000001',
		name: 'Somebody',
		roles: new Set(roles),
		isBlinded: false,
		via: 'page',
		scope: 'write',
		...fields
	};
}

/**
 * Who may do what, as the product's description has it, one line a sentence:
 * observer, experimenter, surgeon, welfare, PI, admin.
 */
const TABLE: [what: string, permissions: Permission[], allowed: string][] = [
	['read animals, surgeries, weights, checks', ['record.read', 'animals.read'], 'oeswp-'],
	['read days, sessions and analyses', ['data.read'], 'oes-p-'],
	['read sealed allocations', ['allocations.read'], 'oes-p-'],
	['read registers', ['registers.read'], 'oeswp-'],
	['comment', ['comments.write'], '-eswp-'],
	['animals and weights', ['animals.write', 'weights.write'], '-es-p-'],
	['health notes', ['health.write'], '-eswp-'],
	[
		'day entries, tallies, turns, landmarks, sessions, uploads, exclusions',
		['days.write', 'turns.write', 'sessions.write', 'exclusions.write'],
		'-es-p-'
	],
	['sign a day', ['days.sign'], '-es-p-'],
	['surgeries, implants, sites, carriages, bundles', ['implants.write'], '--s-p-'],
	['confirm a found tip', ['tips.confirm'], '--s-p-'],
	['set and lift a stop', ['stops.write'], '---wp-'],
	[
		'countersign, answer advice, arenas, designs, protocols, projects, rigs, settings',
		[
			'days.countersign',
			'advice.answer',
			'registers.write',
			'allocations.seal',
			'deputies.write',
			'lab-settings.write'
		],
		'----p-'
	],
	[
		'members, roles, mail, tokens of others, jobs, the log',
		[
			'members.write',
			'tokens.others',
			'mail.read',
			'mail.write',
			'jobs.read',
			'jobs.write',
			'log.read'
		],
		'----pa'
	],
	['one’s own profile, and who is in the lab', ['own.read', 'own.write', 'members.read'], 'oeswpa']
];

const lines = TABLE.flatMap(([what, permissions, allowed]) =>
	permissions.flatMap((permission) =>
		ROLES.map((role, i) => ({ what, permission, role, isAllowed: allowed[i] !== '-' }))
	)
);

describe('the permission table', () => {
	it.each(lines)(
		'$what: $permission for $role is $isAllowed',
		({ permission, role, isAllowed }) => {
			expect(may(actor([role]), permission)).toBe(isAllowed);
		}
	);

	it('has no permission that the table above leaves out', () => {
		const walked = new Set(lines.map((line) => line.permission));
		expect([...walked].sort()).toEqual(Object.keys(PERMISSIONS).sort());
	});

	it('allows nothing to somebody without roles', () => {
		const permissions = Object.keys(PERMISSIONS) as Permission[];
		expect(permissions.filter((permission) => may(actor([]), permission))).toEqual([]);
	});

	it('allows with several roles what any of them allows, and not more', () => {
		const both = actor(['welfare', 'observer']);
		expect(may(both, 'stops.write')).toBe(true);
		expect(may(both, 'data.read')).toBe(true);
		expect(may(both, 'turns.write')).toBe(false);
	});
});

describe('demand', () => {
	it('tells nobody signed in apart from not allowed', () => {
		expect(() => demand(null, 'record.read')).toThrow(Unauthenticated);
		expect(() => demand(actor(['observer']), 'turns.write')).toThrow(Forbidden);
		expect(() => demand(actor(['experimenter']), 'turns.write')).not.toThrow();
	});

	it('lets a token of scope "read" read what its owner may, and write nothing', () => {
		const token = actor(['pi'], { via: 'token', scope: 'read' });
		expect(() => demand(token, 'data.read')).not.toThrow();
		expect(() => demand(token, 'turns.write')).toThrow(/may read only/);
		expect(() => demand(token, 'own.write')).toThrow(/may read only/);
		expect(() => demand(token, 'days.sign')).toThrow(/may read only/);
	});

	it('gives a token of scope "write" its owner’s rights and no more', () => {
		const token = actor(['observer'], { via: 'token', scope: 'write' });
		expect(() => demand(token, 'data.read')).not.toThrow();
		expect(() => demand(token, 'turns.write')).toThrow(Forbidden);
	});

	it('keeps allocations sealed for a blinded PI', () => {
		const blinded = actor(['pi'], { isBlinded: true });
		expect(() => demand(blinded, 'allocations.read')).toThrow(/blinded/);
		expect(() => demand(blinded, 'data.read')).not.toThrow();
	});

	it('lets the lab’s own machine do its work', () => {
		expect(may(systemActor('command'), 'members.write')).toBe(true);
		expect(may(systemActor(), 'sessions.write')).toBe(true);
	});
});
