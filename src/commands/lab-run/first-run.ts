import { signIns, type DemoSignIn } from '../../demo/sign-ins';
import { withClient } from '../cluster/roles';
import { say } from '../machine/say';
import { closeConnections, openConnections } from './connections';

/** Runs a part of the application in this process, with the settings that its children get. */
async function inApplication<T>(env: NodeJS.ProcessEnv, work: () => Promise<T>): Promise<T> {
	Object.assign(process.env, env);
	await openConnections();
	try {
		return await work();
	} finally {
		await closeConnections();
	}
}

export async function fillDemo(env: NodeJS.ProcessEnv): Promise<void> {
	say('Filling the demo lab with simulated data …');
	const { default: fill } = await import('../../demo/fill');
	await inApplication(env, () => fill());
}

/** The sign-ins of the demo lab, when that is what the database holds. */
export async function demoSignIns(ownerUrl: string): Promise<DemoSignIn[]> {
	const people = await withClient(ownerUrl, (client) =>
		client.query<{ email: string }>('SELECT email FROM person WHERE deactivated_at IS NULL')
	);
	const known = new Set(people.rows.map(({ email }) => email));
	return signIns.filter(({ email }) => known.has(email));
}

/** The address at which the first PI of an empty lab is made; undefined once there are people. */
export async function firstAddress(env: NodeJS.ProcessEnv): Promise<string | undefined> {
	const people = await import('$lib/server/services/people');
	return inApplication(env, async () => (await people.firstAddress()) ?? undefined);
}
