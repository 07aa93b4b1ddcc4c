import { join } from 'node:path';
import { CHROMIUM, CURL } from '../machine/debian';
import type { DebianPackage } from '../machine/debian';

/** How the tests of a step are counted: from a report it writes, or as the one check it is. */
export type Count = 'one' | 'vitest' | 'playwright';

export interface Step {
	name: string;
	/** What a person learns when it fails. */
	about: string;
	count: Count;
	needs?: DebianPackage[];
	command(reportFile: string): { words: string[]; env?: NodeJS.ProcessEnv };
}

const bin = (name: string) => join('node_modules/.bin', name);

const vitest = (reportFile: string, ...projects: string[]) => ({
	words: [
		bin('vitest'),
		'run',
		...projects.flatMap((project) => ['--project', project]),
		'--reporter=default',
		'--reporter=json',
		`--outputFile.json=${reportFile}`
	]
});

/** In the order in which they run: quick answers first. */
export const STEPS: Step[] = [
	{
		name: 'format',
		about: 'every file is laid out by Prettier (`npm run format` mends it)',
		count: 'one',
		command: () => ({ words: [bin('prettier'), '--check', '--log-level', 'warn', '.'] })
	},
	{
		name: 'lint',
		about: 'ESLint: direction of imports and forbidden constructs',
		count: 'one',
		command: () => ({ words: [bin('eslint'), '--max-warnings', '0', '.'] })
	},
	{
		name: 'check',
		about: 'types of every file, pages included',
		count: 'one',
		command: () => ({
			words: [bin('svelte-check'), '--tsconfig', './tsconfig.json', '--fail-on-warnings']
		})
	},
	{
		name: 'unit',
		about: 'pure functions, reference figures and components',
		count: 'vitest',
		command: (reportFile) => vitest(reportFile, 'unit', 'component')
	},
	{
		name: 'database',
		about: 'services, routes and API on a real PostgreSQL',
		count: 'vitest',
		command: (reportFile) => vitest(reportFile, 'database')
	},
	{
		name: 'build',
		about: 'the production build',
		count: 'one',
		command: () => ({ words: [process.execPath, 'src/commands/run.mjs', 'build'] })
	},
	{
		name: 'browser',
		about: 'journeys and accessibility in Chromium against a lab of their own',
		count: 'playwright',
		needs: [CHROMIUM, CURL],
		command: (reportFile) => ({
			words: [bin('playwright'), 'test', '--config', 'tests/e2e/playwright.config.ts'],
			env: { PLAYWRIGHT_JSON_OUTPUT_NAME: reportFile }
		})
	}
];
