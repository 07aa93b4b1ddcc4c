import { mkdtempSync, chmodSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from '@playwright/test';
import { anyFreePort } from '../../src/commands/machine/ports';

/**
 * The journeys run against a lab of their own, started as a person starts one: `npm start` on a
 * free port with a throw-away home, which it removes when it stops. While tests are written, E2E_PORT
 * and E2E_HOME name a demo lab that runs already. Playwright reads this file again in each of its
 * processes; the first one's choice reaches the others through the environment.
 */
async function chooseLab() {
	const isGiven = !!process.env.E2E_HOME && !!process.env.E2E_PORT;
	process.env.E2E_PORT ??= String(await anyFreePort());
	if (!process.env.E2E_HOME) {
		process.env.E2E_HOME = mkdtempSync(join(tmpdir(), 'quarterturn-e2e-'));
		// The database's own user must be able to pass.
		chmodSync(process.env.E2E_HOME, 0o711);
	}
	return { port: process.env.E2E_PORT, home: process.env.E2E_HOME, isGiven };
}

const { port, home, isGiven } = await chooseLab();
const baseURL = `http://localhost:${port}`;
const checkout = fileURLToPath(new URL('../..', import.meta.url));

export default defineConfig({
	testDir: '.',
	outputDir: '../../test-results',
	// One lab and two cores: journeys that change the same records must not meet.
	workers: 1,
	forbidOnly: true,
	// Limits that only a hang reaches: a busy machine is slow, not broken.
	timeout: 120_000,
	expect: { timeout: 20_000 },
	reporter: [['list'], ['json']],
	use: {
		baseURL,
		browserName: 'chromium',
		viewport: { width: 1280, height: 900 },
		screenshot: 'only-on-failure',
		launchOptions: {
			executablePath: '/usr/bin/chromium',
			args: [
				'--no-sandbox',
				'--disable-gpu',
				'--disable-quic',
				'--no-first-run',
				'--disable-background-networking',
				'--disable-component-update',
				'--disable-sync'
			]
		}
	},
	projects: [
		{ name: 'journeys', testMatch: '**/*.spec.ts', testIgnore: '**/accessibility*.spec.ts' },
		{ name: 'accessibility', testMatch: '**/accessibility*.spec.ts' }
	],
	webServer: {
		command: 'exec node src/commands/run.mjs start',
		cwd: checkout,
		url: `${baseURL}/api/health`,
		reuseExistingServer: isGiven,
		timeout: 600_000,
		stdout: 'pipe',
		gracefulShutdown: { signal: 'SIGTERM', timeout: 30_000 },
		env: { QUARTERTURN_HOME: home, PORT: port, QUARTERTURN_THROW_AWAY: '1', DEMO: '1' }
	}
});
