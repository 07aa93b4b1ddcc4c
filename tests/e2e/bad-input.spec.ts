import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import { field, fill } from './fields';
import { daysAgo, TAG } from './names';
import { expect, test, visit } from './people';

const positions = readFileSync(
	new URL('../fixtures/ca1-linear-track/linear.csv', import.meta.url),
	'utf8'
)
	.split('\n')
	.slice(0, 2000);

const csv = (name: string, lines: string[]) => ({
	name,
	mimeType: 'text/csv',
	buffer: Buffer.from(lines.join('\n'))
});

const ANIMAL = `BAD${TAG}`;

/** What a form sends, by the page that has it. */
async function post(page: Page, address: string, form: Record<string, string>): Promise<string> {
	const answer = await page.request.post(address, {
		form,
		headers: { origin: new URL(page.url()).origin, accept: 'text/html' },
		maxRedirects: 0
	});
	expect(answer.status(), address).toBe(303);
	return answer.headers().location;
}

let session = '';

test.beforeEach(async ({ open }) => {
	if (session) return;
	const page = await open({ role: 'experimenter' });
	await page.goto('/animals');
	await post(page, '/animals/new', { code: ANIMAL, species: 'rat', sex: 'unknown' });
	session = await post(page, `/animals/${ANIMAL}/sessions/new`, {
		startsAt: `${daysAgo(1)}T10:00`
	});
});

test('a word in a number column is refused with its row and column', async ({ open }) => {
	const page = await open({ role: 'experimenter' });
	await visit(page, session);
	await field(page, 'Files').setInputFiles(csv('word.csv', positions.with(6, '4430.2,fast')));
	const file = page.getByRole('article', { name: 'word.csv' });
	await file.getByRole('button', { name: 'take it in' }).click();
	const refusal = file.getByRole('alert');
	await expect(refusal).toContainText('Row 7, column x_cm');
	await expect(refusal).toContainText('"fast" is not a number');
	await expect(refusal).toContainText('nothing of it is in the record');
	await expect(file.getByText('refused', { exact: true })).toBeVisible();
	await expect(file.getByRole('link', { name: 'word.csv' })).toHaveAttribute('download');
});

test('a zip archive called .csv is refused for what it is', async ({ open }) => {
	const page = await open({ role: 'experimenter' });
	await visit(page, session);
	await field(page, 'Files').setInputFiles({
		name: 'archive.csv',
		mimeType: 'text/csv',
		buffer: Buffer.from([0x50, 0x4b, 0x03, 0x04, ...new Array(200).fill(7)])
	});
	const file = page.getByRole('article', { name: 'archive.csv' });
	await expect(file.getByRole('alert')).toContainText('zip archive');
});

test('milliseconds under a name of seconds are noticed, and can be said', async ({ open }) => {
	const page = await open({ role: 'experimenter' });
	await visit(page, session);
	const inMs = positions.map((line, row) => {
		const [time, place] = line.split(',');
		return row === 0 ? line : `${(Number(time) * 1000).toFixed(1)},${place}`;
	});
	await field(page, 'Files').setInputFiles(csv('fast-clock.csv', inMs));
	const file = page.getByRole('article', { name: 'fast-clock.csv' });
	await file.getByRole('button', { name: 'take it in' }).click();
	await expect(file.getByRole('alert')).toContainText('milliseconds');
	await file.getByLabel('Column t_s holds').selectOption({ label: 'Time, milliseconds' });
	await file.getByRole('button', { name: 'take it in' }).click();
	await expect(file.getByText('taken in', { exact: true })).toBeVisible();
	await expect(file).toContainText(/1\s999 rows/);
});

test('an upload that is cancelled leaves nothing', async ({ open }) => {
	const page = await open({ role: 'experimenter' });
	await visit(page, session);
	// The pieces go nowhere, as on a very slow line.
	await page.route('**/uploads/*', (route) =>
		route.request().method() === 'PATCH' ? undefined : route.continue()
	);
	const begun = page.waitForRequest((request) => request.method() === 'PATCH');
	await field(page, 'Files').setInputFiles(csv('long.csv', positions));
	await expect(page.getByRole('progressbar', { name: 'Uploading long.csv' })).toBeVisible();
	const address = (await begun).url();
	const cleared = page.waitForResponse((answer) => answer.request().method() === 'DELETE');
	await page.getByRole('button', { name: 'Cancel' }).click();
	expect((await cleared).status()).toBe(204);
	await expect(page.getByRole('progressbar', { name: 'Uploading long.csv' })).toBeHidden();
	await page.reload();
	await expect(page.getByRole('article', { name: 'long.csv' })).toHaveCount(0);
	const again = await page.request.head(address, { headers: { 'tus-resumable': '1.0.0' } });
	expect(again.status()).toBeGreaterThanOrEqual(404);
});

test('an edit made on an old copy overwrites nothing', async ({ open }) => {
	const first = await open({ role: 'experimenter' });
	const second = await open({ role: 'surgeon' });
	for (const page of [first, second]) await visit(page, `/animals/${ANIMAL}/edit`);
	await fill(first, { Strain: 'Long-Evans' });
	await first.getByRole('button', { name: 'Save animal' }).click();
	await expect(first).toHaveURL(new RegExp(`/animals/${ANIMAL}$`));

	await fill(second, { Strain: 'Wistar' });
	await second.getByRole('button', { name: 'Save animal' }).click();
	await expect(second.getByRole('alert')).toContainText('Nothing was overwritten');
	await expect(field(second, 'Strain')).toHaveValue('Wistar');
	await first.reload();
	await expect(first.getByRole('main')).toContainText('Long-Evans');
	await expect(first.getByRole('main')).not.toContainText('Wistar');
});
