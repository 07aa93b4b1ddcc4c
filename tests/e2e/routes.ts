import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { APIRequestContext } from '@playwright/test';

const ROUTES = fileURLToPath(new URL('../../src/routes', import.meta.url));
const REGISTERS = ['projects', 'protocols', 'arenas', 'rigs', 'drive-designs', 'drives'];

const ID = '[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}';

/** Routes that have the file, like "(lab)/animals/[code]/edit". */
function routesWith(file: string): string[] {
	return readdirSync(ROUTES, { recursive: true, withFileTypes: true })
		.filter((entry) => entry.name === file)
		.map((entry) => relative(ROUTES, entry.parentPath))
		.sort();
}

/** What stands for each part of an address that varies, once a register. */
export type Parts = Record<string, string>[];

/** Finds the parts in the demo lab, for somebody who may read it. */
export async function partsOf(request: APIRequestContext, origin: string): Promise<Parts> {
	const found = async (page: string, pattern: string) => {
		const html = await (await request.get(page)).text();
		const part = new RegExp(pattern).exec(html)?.[1];
		if (!part) throw new Error(`Nothing on ${page} looks like ${pattern}.`);
		return part;
	};
	const invitee = { name: 'Ada Fennel', email: `ada-${Date.now()}@example.org`, roles: 'observer' };
	await request.post('/lab/members?/invite', { form: invitee, headers: { origin } });
	await request.post('/reset', { form: { email: 'welfare@example.org' }, headers: { origin } });
	const oneTime = {
		'invitation/token': await found('/lab/mail', '/invitation/([\\w-]{20,})'),
		'reset/token': await found('/lab/mail', '/reset/([\\w-]{20,})'),
		// Opens nothing once the lab has people.
		'first/token': 'nothing'
	};
	const code = 'R031';
	const session = await found(`/animals/${code}`, `/animals/${code}/sessions/(${ID})`);
	return Promise.all(
		REGISTERS.map(async (register) => {
			const id = await found(`/lab/${register}`, `/lab/${register}/(${ID})`);
			return { code, letter: 'A', session, register, id, ...oneTime };
		})
	);
}

/** Routes of a room that show a page. */
export const pageRoutes = (room: '(lab)' | '(auth)') =>
	routesWith('+page.svelte').filter((route) => route.startsWith(room));

/**
 * Every address a route has in the demo lab: one for most, one a register for those of registers.
 * Found, not listed: a page that somebody adds is walked too, or asks for its part here.
 */
export function addressesOf(route: string, parts: Parts): string[] {
	const filled = parts.map((part) => {
		const path = route
			.split('/')
			.filter((piece) => piece && !piece.startsWith('('))
			.map((piece, at, pieces) =>
				piece.replace(/\[(\w+)(?:=\w+)?\]/, (_, name: string) => {
					const value = part[`${pieces[at - 1]}/${name}`] ?? part[name];
					if (value === undefined) throw new Error(`Say what [${name}] is in ${route}.`);
					return value;
				})
			);
		return `/${path.join('/')}`;
	});
	return [...new Set(filled)];
}

export interface FormAction {
	route: string;
	name: string;
	/** Where a form posts to. */
	address: string;
}

/** Every form action of signed-in pages. */
export function formActions(parts: Parts): FormAction[] {
	return routesWith('+page.server.ts')
		.filter((route) => route.startsWith('(lab)'))
		.flatMap((route) => {
			const source = readFileSync(join(ROUTES, route, '+page.server.ts'), 'utf8');
			const body = /export const actions[^=]*= \{\n([\s\S]*?)\n\};/.exec(source)?.[1] ?? '';
			const names = Array.from(body.matchAll(/^\t(\w+):/gm), ([, name]) => name);
			return addressesOf(route, parts).flatMap((address) =>
				names.map((name) => ({
					route,
					name,
					address: name === 'default' ? address : `${address}?/${name}`
				}))
			);
		});
}
