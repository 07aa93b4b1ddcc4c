import { defineConfig } from '@playwright/test';
import journeys from './playwright.config';

/** One large upload, on a lab of its own like the journeys; `npm run proof -- recorded-hour`. */
export default defineConfig({
	...journeys,
	reporter: 'list',
	projects: [{ name: 'recorded-hour', testMatch: '**/recorded-hour.ts' }]
});
