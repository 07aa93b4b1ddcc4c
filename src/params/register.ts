import { isRegisterKind, type RegisterKind } from '$lib/schemas/registers';

/** One of the lab's registers: arenas, rigs, drive-designs … */
export const match = (param: string): param is RegisterKind => isRegisterKind(param);
