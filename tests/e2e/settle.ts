import type { Page } from '@playwright/test';
import { expect } from './people';

/** Above this a page is drawn in part; no page of the demo lab is as long. */
const TALLEST_PX = 12_000;

/**
 * Waits until what is drawn only when it comes into view is drawn, by a window as high as the page.
 * The window stays so high: a smaller one might clear away what it no longer shows.
 */
export async function settle(page: Page): Promise<void> {
	const { width = 1024 } = page.viewportSize() ?? {};
	const height = await page.evaluate(() => document.documentElement.scrollHeight);
	await page.setViewportSize({ width, height: Math.min(TALLEST_PX, Math.max(600, height)) });
	// A result that a worker still computes comes by itself.
	await expect(page.getByRole('progressbar')).toHaveCount(0, { timeout: 90_000 });
	await expect(page.getByRole('status').filter({ hasText: /^Fetching/ })).toHaveCount(0);
}
