import type { Actor } from '$lib/server/access';

declare global {
	namespace App {
		interface Error {
			message: string;
			/** Given for unexpected faults only: the id under which the fault was logged. */
			id?: string;
		}
		interface Locals {
			actor: Actor | null;
			sessionId: string | null;
			theme: 'bench' | 'evening' | 'red';
		}
	}
}

export {};
