import type { Role } from '$lib/schemas/roles';
import { Forbidden, Unauthenticated } from './errors';
import type { IdempotentCall } from './idempotent-call';

/** Who acts, and by which door they came in. Made once per request and passed down. */
export interface Actor {
	/** Null for the system's own work and for the command line. */
	personId: string | null;
	name: string;
	roles: ReadonlySet<Role>;
	/** Marked blinded: sealed allocations stay hidden whatever the roles say. */
	isBlinded: boolean;
	via: 'page' | 'token' | 'command' | 'system';
	/** Tokens of scope "read" may not write, whatever their owner may. */
	scope: 'read' | 'write';
	/** Set while a script's call that may be sent twice is recorded. */
	call?: IdempotentCall;
}

/**
 * The permission table: who may do what. Nothing else in the code decides by role.
 * What is not listed is denied, and a service's first statement asks here.
 */
export const PERMISSIONS = {
	'record.read': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi'],
	'animals.read': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi'],
	'data.read': ['observer', 'experimenter', 'surgeon', 'pi'],
	'allocations.read': ['observer', 'experimenter', 'surgeon', 'pi'],
	'comments.write': ['experimenter', 'surgeon', 'welfare', 'pi'],
	'animals.write': ['experimenter', 'surgeon', 'pi'],
	'weights.write': ['experimenter', 'surgeon', 'pi'],
	'health.write': ['experimenter', 'surgeon', 'welfare', 'pi'],
	'days.write': ['experimenter', 'surgeon', 'pi'],
	'turns.write': ['experimenter', 'surgeon', 'pi'],
	'sessions.write': ['experimenter', 'surgeon', 'pi'],
	'exclusions.write': ['experimenter', 'surgeon', 'pi'],
	'days.sign': ['experimenter', 'surgeon', 'pi'],
	'implants.write': ['surgeon', 'pi'],
	'tips.confirm': ['surgeon', 'pi'],
	'stops.write': ['welfare', 'pi'],
	'days.countersign': ['pi'],
	'advice.answer': ['pi'],
	'registers.read': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi'],
	'registers.write': ['pi'],
	'allocations.seal': ['pi'],
	'deputies.write': ['pi'],
	'lab-settings.write': ['pi'],
	'members.read': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin'],
	'members.write': ['pi', 'admin'],
	'tokens.others': ['pi', 'admin'],
	'mail.read': ['pi', 'admin'],
	'mail.write': ['pi', 'admin'],
	'jobs.read': ['pi', 'admin'],
	'jobs.write': ['pi', 'admin'],
	'log.read': ['pi', 'admin'],
	'own.read': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin'],
	'own.write': ['observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin']
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

/** Deputies of one animal may do these for it, as if they were its PI. */
export const DEPUTY_MAY: readonly Permission[] = ['advice.answer'];

const isReading = (permission: Permission) => permission.endsWith('.read');

export function may(by: Actor | null, permission: Permission): boolean {
	if (!by) return false;
	if (by.via === 'token' && by.scope === 'read' && !isReading(permission)) return false;
	if (permission === 'allocations.read' && by.isBlinded) return false;
	if (by.via === 'system' || by.via === 'command') return true;
	return PERMISSIONS[permission].some((role) => by.roles.has(role));
}

/** @throws Unauthenticated when nobody is signed in, Forbidden when the table says no. */
export function demand(by: Actor | null, permission: Permission): asserts by is Actor {
	if (!by) throw new Unauthenticated();
	if (may(by, permission)) return;
	if (by.via === 'token' && by.scope === 'read' && !isReading(permission)) {
		throw new Forbidden('This token may read only. Make one of scope "write" for this call.');
	}
	if (permission === 'allocations.read' && by.isBlinded) {
		throw new Forbidden('You are marked blinded, so allocations stay sealed for you.');
	}
	throw new Forbidden();
}

/** For what belongs to one person: the system and the command line have no self. */
export function personOf(by: Actor): string {
	if (by.personId === null) throw new Forbidden('Only a person can do this.');
	return by.personId;
}

/** Acts for the product itself: jobs, the demo lab, the command line on the lab's own machine. */
export function systemActor(via: 'system' | 'command' = 'system'): Actor {
	return {
		personId: null,
		name: 'Quarterturn',
		roles: new Set(),
		isBlinded: false,
		via,
		scope: 'write'
	};
}
