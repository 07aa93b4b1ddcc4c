import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { withClient } from '../cluster/roles';
import { CHECKOUT } from '../home/home';
import { say } from '../machine/say';
import { closeConnections, openConnections } from './connections';
import type { DemoSignIn } from './greeting';

/** A part of the application that this process runs itself, with the settings its children get. */
async function load<T>(path: string, env: NodeJS.ProcessEnv): Promise<T | undefined> {
	const file = join(CHECKOUT, path);
	if (!existsSync(file)) return undefined;
	Object.assign(process.env, env);
	return (await import(pathToFileURL(file).href)) as T;
}

export async function fillDemo(env: NodeJS.ProcessEnv): Promise<void> {
	const demo = await load<{ default: () => Promise<void> }>('src/demo/fill.ts', env);
	if (!demo) return say('There is no demo lab in this version; the lab stays empty.');
	say('Filling the demo lab with simulated data …');
	try {
		await openConnections();
		await demo.default();
	} finally {
		await closeConnections();
	}
}

/** The sign-ins of the demo lab, when that is what the database holds. */
export async function demoSignIns(ownerUrl: string): Promise<DemoSignIn[]> {
	const demo = await load<{ signIns: DemoSignIn[] }>('src/demo/sign-ins.ts', {});
	if (!demo) return [];
	const emails = await withClient(ownerUrl, (client) =>
		client.query<{ email: string }>('SELECT email FROM person')
	);
	const known = new Set(emails.rows.map(({ email }) => email.toLowerCase()));
	return demo.signIns.filter(({ email }) => known.has(email.toLowerCase()));
}

/** The address at which the first PI of an empty lab is made; undefined once there are people. */
export async function firstAddress(env: NodeJS.ProcessEnv): Promise<string | undefined> {
	Object.assign(process.env, env);
	const people = await import('$lib/server/services/people');
	try {
		await openConnections();
		return (await people.firstAddress()) ?? undefined;
	} finally {
		await closeConnections();
	}
}
