import { z } from 'zod';

export const ROLES = ['observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin'] as const;

export type Role = (typeof ROLES)[number];

export const roleSchema = z.enum(ROLES);

/** As shown to people. */
export const ROLE_NAMES: Record<Role, string> = {
	observer: 'Observer',
	experimenter: 'Experimenter',
	surgeon: 'Surgeon',
	welfare: 'Welfare',
	pi: 'PI',
	admin: 'Admin'
};
