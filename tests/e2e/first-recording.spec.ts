import { fileURLToPath } from 'node:url';
import type { Locator, Page } from '@playwright/test';
import { choose, field, fill, panel } from './fields';
import { daysAgo, TAG } from './names';
import { expect, personOf, test, visit } from './people';

const recording = (file: string) =>
	fileURLToPath(new URL(`../fixtures/ca1-linear-track/${file}`, import.meta.url));

const PROTOCOL = `OPEN-${TAG}`;
const ARENA = `Straight track ${TAG}`;
const DESIGN = `Sixteen tetrodes ${TAG}`;
const ANIMAL = `OR${TAG}`;

async function enter(page: Page, register: string, singular: string, rest: () => Promise<void>) {
	await visit(page, `/lab/${register}/new`);
	await rest();
	await page.getByRole('button', { name: `Enter ${singular}` }).click();
	await expect(page).toHaveURL(new RegExp(`/lab/${register}$`));
}

/** The figure under its name in a list of figures. */
const figure = (place: Locator, name: string) =>
	place
		.locator('div')
		.filter({ has: place.page().getByRole('term').getByText(name, { exact: true }) })
		.last()
		.getByRole('definition')
		.first();

test('a lab takes in its first recording and sees what its cells say', async ({ open }) => {
	test.setTimeout(300_000);

	await test.step('a PI writes down protocol, arena and drive design', async () => {
		const page = await open({ role: 'pi' });
		await enter(page, 'protocols', 'protocol', async () => {
			await fill(page, {
				Number: PROTOCOL,
				Title: 'Recording of one rat on a track',
				'Valid until': daysAgo(-300),
				'Animals allowed': '4',
				'Surgeries allowed per animal': '1',
				'Weight floor': '85'
			});
			await page.getByRole('checkbox', { name: personOf('surgeon').name }).check();
		});
		await expect(page.getByRole('link', { name: PROTOCOL })).toBeVisible();
		await enter(page, 'arenas', 'arena', async () => {
			await fill(page, { Name: ARENA, 'Shape and size': 'straight:117' });
			await expect(page.getByText('Reads as').locator('..')).toContainText('117 cm');
		});
		await enter(page, 'drive-designs', 'drive design', () =>
			fill(page, { Name: DESIGN, Travel: '5' })
		);
		await expect(page.getByRole('row').filter({ hasText: DESIGN })).toContainText('317.5');
	});

	await test.step('an experimenter enters the animal, on the protocol', async () => {
		const page = await open({ role: 'experimenter' });
		await visit(page, '/animals/new');
		await fill(page, { Code: ANIMAL, Strain: 'Long-Evans', 'Baseline weight': '420' });
		await choose(page, 'Sex', 'male');
		await choose(page, 'Protocol', PROTOCOL);
		await fill(page, { Since: daysAgo(40) });
		await page.getByRole('button', { name: 'Enter animal' }).click();
		await expect(page.getByRole('heading', { level: 1, name: ANIMAL })).toBeVisible();
		await expect(panel(page, 'Protocol and projects')).toContainText(PROTOCOL);
	});

	await test.step('the surgeon records what was implanted', async () => {
		const page = await open({ role: 'surgeon' });
		await visit(page, `/animals/${ANIMAL}`);
		await page.getByRole('link', { name: 'New implant' }).first().click();
		await fill(page, { 'Day of the surgery': daysAgo(30), 'Mass of the implant': '14' });
		await choose(page, 'Surgeon', personOf('surgeon').name);
		await choose(page, 'Drive design', DESIGN);
		const block = page.getByRole('group', { name: 'Block 1' });
		await fill(block, { Bundles: 'T01-T16', Site: 'right dorsal CA1' });
		await page.getByRole('button', { name: 'Enter implant' }).click();
		await expect(page).toHaveURL(new RegExp(`/animals/${ANIMAL}/implants/A$`));
		await expect(page.getByRole('row').filter({ hasText: `${ANIMAL}-T16` })).toBeVisible();
	});

	const page = await open({ role: 'experimenter' });

	await test.step('an experimenter creates the session on the recorder’s own clock', async () => {
		await visit(page, `/animals/${ANIMAL}`);
		await page.getByRole('link', { name: 'New session' }).first().click();
		const day = daysAgo(1);
		await fill(page, {
			'Started at': `${day}T10:00:00`,
			// The recorder had run for 4397 s.
			'Recorder’s clock showed zero at': `${day}T08:46:43`
		});
		const epochs = page.getByRole('table', { name: 'Epochs of the session' });
		await fill(epochs, {
			'Name, epoch 1': 'run',
			'Start, epoch 1': '4430',
			'Stop, epoch 1': '5375',
			'Name, epoch 2': 'rest',
			'Start, epoch 2': '5390',
			'Stop, epoch 2': '6365.27'
		});
		await choose(epochs, 'Arena, epoch 1', ARENA);
		await choose(epochs, 'Kind, epoch 2', 'rest');
		await page.getByRole('button', { name: 'Create session' }).click();
		await expect(panel(page, 'Session')).toContainText('4430');
	});

	await test.step('uploads positions and spikes, looks at the columns and takes them in', async () => {
		for (const [name, columns] of [
			['linear.csv', { t_s: 'Time, seconds', x_cm: 'x, cm' }],
			['spikes.csv', { unit: 'Unit', t_s: 'Time, seconds', bundle: 'Bundle' }]
		] as const) {
			await field(page, 'Files').setInputFiles(recording(name));
			const file = page.getByRole('article', { name });
			await expect(file).toContainText('waits for you');
			await expect(file).toContainText('between commas, decimal points');
			for (const [column, holds] of Object.entries(columns)) {
				await expect(
					file.getByLabel(`Column ${column} holds`).getByRole('option', { selected: true })
				).toHaveText(holds);
			}
			await file.getByRole('button', { name: 'take it in' }).click();
			await expect(file).toContainText('taken in', { timeout: 30_000 });
		}
	});

	await test.step('follows the analysis to its result without doing anything', async () => {
		const results = panel(page, 'Results');
		await expect(results.getByRole('progressbar')).toBeVisible();
		const decoding = panel(page, 'Where the cells say it is');
		await expect(decoding).toBeVisible({ timeout: 90_000 });
		await expect(figure(decoding, 'Median error')).toHaveText(/^8\.4[56] cm \(\d+\.\d–\d+\.\d\)$/);
		await expect(figure(decoding, 'Chance')).toHaveText(/^41\.[56]\d* cm$/);
		await expect(figure(decoding, 'Windows, units')).toHaveText(/, 18$/);
		// Figures are fetched when they come into view.
		await decoding.scrollIntoViewIfNeeded();
		await expect(decoding.getByText('Error by place')).toBeVisible();
	});

	await test.step('sees each unit on a card and all of them in the table', async () => {
		const units = panel(page, 'Units');
		await expect(units).toContainText('31 units, sorted along the track');
		await units.scrollIntoViewIfNeeded();
		await expect(units).toContainText('3 units never fired during running');
		await units.getByRole('button', { name: 'more of 28' }).click();
		await expect(units.getByRole('article')).toHaveCount(28);
		const map = units.getByLabel(/^Firing-rate map of unit T01-14, peak \d/);
		await map.scrollIntoViewIfNeeded();
		await expect(map).toBeVisible();
		await units.getByText('All figures as a table').click();
		await expect(units.getByRole('row').filter({ hasText: 'T13' }).first()).toBeVisible();
	});
});
