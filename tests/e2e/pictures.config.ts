import { defineConfig } from '@playwright/test';
import journeys from './playwright.config';

/** Pictures of every page, on a lab of their own like the journeys; `npm run proof -- screenshots`. */
export default defineConfig({
	...journeys,
	reporter: 'list',
	projects: [{ name: 'pictures', testMatch: '**/pictures.ts' }]
});
