import type { Role } from '$lib/schemas/roles';

/** Somebody of the demo lab, with a password that is no secret. */
export interface DemoSignIn {
	role: Role;
	/** As the start's greeting lists them. */
	roles: Role[];
	name: string;
	email: string;
	password: string;
}

const PASSWORD = 'enamel-and-brass';

const person = (role: Role, name: string): DemoSignIn => ({
	role,
	roles: [role],
	name,
	email: `${role}@example.org`,
	password: PASSWORD
});

/** Invented people, one a role. example.org belongs to nobody (RFC 2606). */
export const signIns: DemoSignIn[] = [
	person('pi', 'Rowan Quill'),
	person('surgeon', 'Sefa Marlowe'),
	person('experimenter', 'Juno Ashgrove'),
	person('welfare', 'Wren Hollis'),
	person('observer', 'Tam Birchall'),
	person('admin', 'Ivo Castellan')
];
