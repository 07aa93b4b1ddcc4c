import { test as base, expect, type BrowserContextOptions, type Page } from '@playwright/test';
import { signIns } from '../../src/demo/sign-ins';
import { partsOf, type Parts } from './routes';

export { expect };

export type Role = (typeof signIns)[number]['role'];
type Cookies = Extract<BrowserContextOptions['storageState'], object>;

export function personOf(role: Role) {
	const found = signIns.find((person) => person.role === role);
	if (!found) throw new Error(`Nobody of the demo lab is ${role}.`);
	return found;
}

interface Options extends BrowserContextOptions {
	role: Role;
}

/**
 * Tests that act as people of the demo lab. `cookies` signs each role in once, for sign-in itself
 * is another test's matter; `open` gives a browser of that person's own; `parts` are the codes and
 * ids of the demo lab that addresses are made of.
 */
export const test = base.extend<
	{ open: (options: Options) => Promise<Page> },
	{ cookies: (role: Role) => Promise<Cookies>; parts: Parts }
>({
	cookies: [
		async ({ playwright }, use, { project }) => {
			const signedIn = new Map<Role, Promise<Cookies>>();
			const signIn = async (role: Role) => {
				const { email, password } = personOf(role);
				const { baseURL = '' } = project.use;
				const request = await playwright.request.newContext({ baseURL });
				const answer = await request.post('/sign-in', {
					form: { email, password },
					// As a browser's own form does it; a script would be answered in JSON.
					headers: { origin: baseURL, accept: 'text/html' },
					maxRedirects: 0
				});
				expect(answer.status(), `sign-in of ${email}`).toBe(303);
				const state = await request.storageState();
				await request.dispose();
				return state;
			};
			await use((role) => {
				const known = signedIn.get(role) ?? signIn(role);
				signedIn.set(role, known);
				return known;
			});
		},
		{ scope: 'worker' }
	],
	parts: [
		async ({ playwright, cookies }, use, { project }) => {
			const { baseURL = '' } = project.use;
			const request = await playwright.request.newContext({
				baseURL,
				storageState: await cookies('pi')
			});
			await use(await partsOf(request, baseURL));
			await request.dispose();
		},
		{ scope: 'worker' }
	],
	open: async ({ browser, cookies, viewport, baseURL }, use) => {
		const opened: Page[] = [];
		await use(async ({ role, ...options }) => {
			const storageState = await cookies(role);
			const context = await browser.newContext({ baseURL, viewport, storageState, ...options });
			const page = await context.newPage();
			opened.push(page);
			return page;
		});
		for (const page of opened) await page.context().close();
	}
});

/**
 * Opens a page and waits until its script has taken over: Kit announces page changes to screen
 * readers in an element that is there from then on. Earlier, a form would be sent the plain way.
 */
export async function visit(page: Page, address: string): Promise<void> {
	await page.goto(address);
	await page.locator('#svelte-announcer').waitFor({ state: 'attached' });
}
