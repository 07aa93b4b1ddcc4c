import type { Page } from '@playwright/test';
import { expect } from './people';

/** Above this a page is drawn in part; no page of the demo lab is as long. */
const TALLEST_PX = 12_000;

/** A window as high as the page, so that what is drawn only when it comes into view is drawn. */
async function showAll(page: Page): Promise<void> {
	const { width = 1024 } = page.viewportSize() ?? {};
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width, height: Math.min(TALLEST_PX, Math.max(600, height)) });
}

/**
 * Waits until the whole page is drawn. What is drawn makes the page higher, so the window follows it.
 * The window stays so high: a smaller one might clear away what it no longer shows.
 */
export async function settle(page: Page): Promise<void> {
	await showAll(page);
	// A result that a worker still computes comes by itself.
	await expect(page.getByRole('progressbar')).toHaveCount(0, { timeout: 90_000 });
	await expect(async () => {
		await showAll(page);
		const fetching = page.getByRole('status').filter({ hasText: /^Fetching/ });
		await expect(fetching).toHaveCount(0, { timeout: 1_000 });
	}).toPass({ timeout: 30_000 });
}
