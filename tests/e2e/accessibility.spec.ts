import type { Page } from '@playwright/test';
import axe from 'axe-core';
import { expect, test, visit, type Role } from './people';
import { addressesOf, pageRoutes } from './routes';
import { settle } from './settle';

const THEMES = ['bench', 'evening', 'red'] as const;
const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const DESK = { width: 1024, height: 900 };
const PHONE = { width: 390, height: 844 };

/** Puts axe into the page, once a page: it is half a megabyte. */
async function bringAxe(page: Page): Promise<void> {
	await page.emulateMedia({ reducedMotion: 'reduce' });
	await page.evaluate(axe.source);
}

/** What axe holds to be serious or worse, in one theme. */
async function findings(page: Page, theme: string, runOnly: axe.RunOptions['runOnly']) {
	return page.evaluate(
		async ([name, only]) => {
			document.documentElement.dataset.theme = name;
			// Colours that fade have arrived after a frame, with motion reduced.
			await new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve)));
			const { axe: checker } = window as unknown as { axe: typeof axe };
			const { violations } = await checker.run(document, {
				runOnly: only,
				resultTypes: ['violations'],
				preload: false
			});
			return violations
				.filter(({ impact }) => impact === 'serious' || impact === 'critical')
				.map(
					({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 200)).join(' | ')}`
				);
		},
		[theme, runOnly] as const
	);
}

/** All rules once; what a theme changes is colour, so the others are asked about colour only. */
async function expectAccessible(page: Page): Promise<void> {
	for (const theme of THEMES) {
		const rules = theme === 'bench' ? RULES : { type: 'rule' as const, values: ['color-contrast'] };
		const where = `${page.url()} in ${theme} at ${page.viewportSize()?.width} px`;
		expect.soft(await findings(page, theme, rules), where).toEqual([]);
	}
}

async function expectNoSidewaysScroll(page: Page): Promise<void> {
	const excess = await page.evaluate(
		() => document.documentElement.scrollWidth - document.documentElement.clientWidth
	);
	expect.soft(excess, `${page.url()} at ${page.viewportSize()?.width} px`).toBeLessThanOrEqual(0);
}

async function inspect(page: Page, address: string): Promise<void> {
	await page.setViewportSize(DESK);
	await visit(page, address);
	await settle(page);
	await bringAxe(page);
	await expectAccessible(page);
	await expectNoSidewaysScroll(page);
	await page.setViewportSize({ ...DESK, width: 1600 });
	await expectNoSidewaysScroll(page);
	await page.setViewportSize(PHONE);
	await expectNoSidewaysScroll(page);
	expect.soft(await findings(page, 'bench', RULES), `${address} on a phone`).toEqual([]);
}

/** One browser for all pages: each with its own would fetch the whole application again. */
function shared(role: Role | null): { page: Page } {
	const kept = {} as { page: Page };
	test.beforeAll(async ({ browser, baseURL, cookies }) => {
		const storageState = role ? await cookies(role) : undefined;
		kept.page = await browser.newPage({ baseURL, storageState });
	});
	test.afterAll(() => kept.page.close());
	return kept;
}

test.describe('pages of the lab', () => {
	const kept = shared('pi');
	for (const route of pageRoutes('(lab)')) {
		test(route, async ({ parts }) => {
			const addresses = addressesOf(route, parts);
			test.setTimeout(30_000 * addresses.length);
			for (const address of addresses) await inspect(kept.page, address);
		});
	}
});

test.describe('pages for those who are not signed in', () => {
	const kept = shared(null);
	for (const route of pageRoutes('(auth)')) {
		test(route, async ({ parts }) => {
			for (const address of addressesOf(route, parts)) await inspect(kept.page, address);
		});
	}
});

test.describe('what opens over a page', () => {
	const kept = shared('pi');
	const opened: [string, string, (page: Page) => Promise<void>][] = [
		[
			'the palette',
			'/animals',
			async (page) => {
				await page.keyboard.press('Control+k');
				await page.getByRole('combobox', { name: 'Page or animal' }).fill('r03');
				await expect(page.getByRole('option', { name: 'R031' })).toBeVisible();
			}
		],
		[
			'a question before a withdrawal',
			'/animals/R031/edit',
			async (page) => {
				await page.getByRole('button', { name: 'Withdraw' }).click();
				await expect(page.getByRole('dialog')).toBeVisible();
			}
		],
		[
			'a form with its mistakes',
			'/animals/new',
			async (page) => {
				await page.getByLabel(/^Code/).fill('not a code');
				await page.getByRole('button', { name: 'Enter animal' }).click();
				await expect(page.locator('[aria-invalid="true"]').first()).toBeVisible();
			}
		],
		[
			'a page that is not there',
			'/animals/NOBODY',
			async (page) => expect(page.getByText('404')).toBeVisible()
		]
	];
	for (const [what, address, act] of opened) {
		test(what, async () => {
			const { page } = kept;
			await page.setViewportSize(DESK);
			await visit(page, address);
			await act(page);
			await bringAxe(page);
			await expectAccessible(page);
			await page.setViewportSize(PHONE);
			await expectNoSidewaysScroll(page);
		});
	}
});
