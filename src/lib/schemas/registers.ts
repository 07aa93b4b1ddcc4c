import type { RegisterDescriptor } from './register-descriptor';
import { arenas } from './registers/arena';
import { drives } from './registers/drive';
import { driveDesigns } from './registers/drive-design';
import { projects } from './registers/project';
import { protocols } from './registers/protocol';
import { rigs } from './registers/rig';

/** Every register of the lab, under the name it has in an address. One page serves them all. */
export const registers = {
	projects,
	protocols,
	arenas,
	rigs,
	'drive-designs': driveDesigns,
	drives
} as const satisfies Record<string, RegisterDescriptor>;

export type RegisterKind = keyof typeof registers;

export const registerKinds = Object.keys(registers) as RegisterKind[];

export function isRegisterKind(name: string): name is RegisterKind {
	return Object.hasOwn(registers, name);
}
