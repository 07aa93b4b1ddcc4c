import type { APIRequestContext } from '@playwright/test';
import { choose, fill, panel } from './fields';
import { TAG } from './names';
import { expect, test, visit } from './people';
import { PLAUSIBLE } from './plausible';
import { addressesOf, formActions, pageRoutes, type FormAction } from './routes';

/** The page of an observer's own matters. */
const OWN = /^\(lab\)\/profile$/;
/** Opening a sealed allocation is a reading that is logged; a token of one's own may be revoked. */
const isOwn = ({ route, name }: FormAction) =>
	OWN.test(route) || name === 'unseal' || name === 'revokeToken';

const isForm = (route: string) => /\/(new|edit|paste)$/.test(route);

test('an observer reads pages that offer no way to write', async ({ open, parts }) => {
	// Without scripts, forms that would stand in dialogs are on the page itself.
	const page = await open({ role: 'observer', javaScriptEnabled: false });
	let readable = 0;
	for (const route of pageRoutes('(lab)').filter((one) => !isForm(one))) {
		for (const address of addressesOf(route, parts)) {
			const answer = await page.goto(address);
			if (answer?.status() === 403) continue;
			readable++;
			expect(answer?.status(), address).toBe(200);
			if (OWN.test(route)) continue;
			const main = page.getByRole('main');
			const buttons = main.locator('form[method="post" i] button:enabled');
			await expect.soft(buttons, `buttons on ${address}`).toHaveCount(0);
			const links = main.locator('a:is([href$="/new"], [href$="/edit"], [href$="/paste"])');
			await expect.soft(links, `links on ${address}`).toHaveCount(0);
			await expect.soft(main.locator('input[type="file"]'), address).toHaveCount(0);
		}
	}
	expect(readable).toBeGreaterThan(12);
});

test('an observer who opens a form page is told why not', async ({ open, parts }) => {
	const page = await open({ role: 'observer' });
	const forms = pageRoutes('(lab)').filter(isForm);
	expect(forms.length).toBeGreaterThan(7);
	for (const address of forms.flatMap((route) => addressesOf(route, parts))) {
		const answer = await page.request.get(address);
		expect.soft(answer.status(), address).toBe(403);
	}
	await page.goto('/animals/new');
	await expect(page.getByText('403')).toBeVisible();
	await page.getByRole('link', { name: 'Go to Today' }).click();
	await expect(page).toHaveURL(/\/$/);
});

test('every form action refuses an observer', async ({ open, parts, baseURL }) => {
	const { request } = await open({ role: 'observer' });
	const actions = formActions(parts).filter((action) => !isOwn(action));
	expect(actions.length).toBeGreaterThan(40);
	for (const { address } of actions) {
		const answer = await request.post(address, {
			form: PLAUSIBLE,
			headers: { origin: baseURL ?? '', accept: 'text/html' },
			maxRedirects: 0
		});
		expect.soft(answer.status(), address).toBe(403);
	}
	const piece = await request.post('/uploads', {
		headers: { 'tus-resumable': '1.0.0', 'upload-length': '3', origin: baseURL ?? '' }
	});
	expect(piece.status(), 'an upload in pieces').toBe(403);
});

interface Description {
	paths: Record<string, Record<string, unknown>>;
}

async function writesOf(request: APIRequestContext) {
	const { paths }: Description = await (await request.get('/api/v1/openapi.json')).json();
	return Object.entries(paths).flatMap(([path, methods]) =>
		Object.keys(methods)
			.filter((method) => ['post', 'put', 'patch', 'delete'].includes(method))
			.map((method) => ({ method: method.toUpperCase(), path }))
	);
}

test('every write of the API refuses an observer’s token', async ({ open, request }) => {
	const page = await open({ role: 'observer' });
	await visit(page, '/profile');
	const tokens = panel(page, 'API tokens');
	await fill(tokens, { 'What for': `Trying to write ${TAG}`, 'Lives for': '1' });
	await choose(tokens, 'May', 'Read and write');
	await tokens.getByRole('button', { name: 'Make token' }).click();
	const secret = await tokens.getByRole('status').getByRole('code').innerText();

	const headers = { authorization: `Bearer ${secret.trim()}` };
	expect((await request.get('/api/v1/animals', { headers })).status()).toBe(200);
	const writes = await writesOf(request);
	expect(writes.length).toBeGreaterThan(6);
	for (const { method, path } of writes) {
		const address = path
			.replace('{code}', 'R031')
			.replace('{kind}', 'position')
			.replace('{date}', '2026-01-05')
			.replace(/\{\w+\}/g, PLAUSIBLE.id);
		// Descriptions may write their paths below the server's address.
		const full = address.startsWith('/api/') ? address : `/api/v1${address}`;
		const answer = await request.fetch(full, { method, headers, data: {} });
		expect.soft(answer.status(), `${method} ${full}`).toBe(403);
		expect.soft(await answer.json()).toMatchObject({ code: 'forbidden' });
	}
});
