import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';
import { expect, test, visit } from './people';
import { addressesOf, pageRoutes } from './routes';
import { settle } from './settle';

const FOLDER = fileURLToPath(new URL('../reports/screenshots', import.meta.url));
const THEMES = ['bench', 'evening', 'red'];
const WINDOWS = [
	{ width: 390, height: 844 },
	{ width: 1024, height: 768 },
	{ width: 1600, height: 1000 }
];

/** "animals-R031-implants-A" from its address; ids and one-time words change with each lab. */
function nameOf(address: string): string {
	const words = address.replace(/[\w-]{20,}/g, 'id').split('/');
	return words.filter(Boolean).join('-') || 'today';
}

/** One load a width; the theme is switched on the page that is there. */
async function picture(page: Page, address: string): Promise<void> {
	for (const window of WINDOWS) {
		await page.setViewportSize(window);
		await visit(page, address);
		await settle(page);
		for (const theme of THEMES) {
			await page.locator('html').evaluate((root, name) => (root.dataset.theme = name), theme);
			const file = `${nameOf(address)}-${window.width}-${theme}.png`;
			// With the window as high as the page, bars that stick to an edge stand where they belong.
			await page.screenshot({ path: join(FOLDER, file), animations: 'disabled' });
			expect(
				await page.evaluate(() => document.documentElement.scrollWidth),
				file
			).toBeLessThanOrEqual(window.width);
		}
	}
}

test.beforeAll(() => mkdirSync(FOLDER, { recursive: true }));

for (const route of pageRoutes('(lab)')) {
	test(route, async ({ open, parts }) => {
		const page = await open({ role: 'pi' });
		const addresses = addressesOf(route, parts);
		test.setTimeout(90_000 * addresses.length);
		for (const address of addresses) await picture(page, address);
	});
}

for (const route of pageRoutes('(auth)')) {
	test(route, async ({ page, parts }) => {
		test.setTimeout(90_000);
		for (const address of addressesOf(route, parts)) await picture(page, address);
	});
}
