import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

// The direction of imports, one rule per room. A later block replaces an earlier one for the
// files it names, so each room lists everything it may not reach.
const SERVER = { group: ['$lib/server', '$lib/server/*', '**/lib/server/**'] };
const MODELS = {
	group: ['$lib/server/models/*', '**/server/models/*'],
	message: 'Ask a service; only services and other models read models.'
};
const SEQUELIZE = {
	group: ['sequelize', 'pg', 'pg-boss'],
	message: 'Only the server side of services reaches the database.'
};

/**
 * @param {string[]} files
 * @param {({ message?: string, allowTypeImports?: boolean } & ({ group: string[] } | { regex: string }))[]} patterns
 * @param {string[]} [ignores]
 * @returns {import('eslint').Linter.Config}
 */
const direction = (files, patterns, ignores = []) => ({
	files,
	ignores: ['**/*.test.ts', ...ignores],
	rules: {
		'@typescript-eslint/no-restricted-imports': ['error', { patterns }]
	}
});

const typesOnly = (/** @type {{ group: string[] }} */ pattern, /** @type {string} */ message) => ({
	...pattern,
	message,
	allowTypeImports: true
});

export default ts.config(
	{
		ignores: [
			'node_modules/',
			'build/',
			'.svelte-kit/',
			'.quarterturn/',
			'uploads/',
			'static/',
			'src/kernel/',
			'test-results/',
			'tests/fixtures/',
			'tests/reports/'
		]
	},
	js.configs.recommended,
	ts.configs.strict,
	svelte.configs.recommended,
	prettier,
	svelte.configs.prettier,
	{
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		linterOptions: { reportUnusedDisableDirectives: 'error', noInlineConfig: true },
		rules: {
			// TypeScript knows every name; this rule does not know types.
			'no-undef': 'off',
			eqeqeq: 'error',
			'no-console': 'error',
			'no-empty': ['error', { allowEmptyCatch: false }],
			'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx'], location: 'anywhere' }],
			'@typescript-eslint/ban-ts-comment': ['error', { 'ts-expect-error': true }],
			'@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
			'@typescript-eslint/no-unused-vars': [
				'error',
				{ argsIgnorePattern: '^_', varsIgnorePattern: '^_' }
			]
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: {
			parserOptions: { parser: ts.parser, extraFileExtensions: ['.svelte'], svelteConfig }
		}
	},
	{
		// Components take addresses as `ResolvedPathname`, which only `resolve()` gives; the rule
		// sees calls, not types.
		files: ['src/lib/components/**'],
		rules: { 'svelte/no-navigation-without-resolve': 'off' }
	},
	{
		// A command talks to the terminal; that is its job.
		files: ['src/commands/**', 'tests/**'],
		rules: { 'no-console': 'off' }
	},
	{
		files: ['src/lib/analysis/**/*.ts'],
		ignores: ['**/*.test.ts'],
		rules: {
			'no-restricted-properties': [
				'error',
				{ object: 'Math', property: 'random', message: 'Random numbers are passed in, seeded.' },
				{ object: 'Date', property: 'now', message: 'The numeric core has no clock.' },
				{ object: 'performance', property: 'now', message: 'The numeric core has no clock.' }
			],
			'no-restricted-syntax': [
				'error',
				{ selector: "NewExpression[callee.name='Date']", message: 'The numeric core has no clock.' }
			],
			'no-restricted-globals': [
				'error',
				'process',
				'window',
				'document',
				'fetch',
				'setTimeout',
				'crypto'
			]
		}
	},
	direction(
		['src/lib/analysis/**/*.ts'],
		[
			{
				group: ['$*', '$*/**', 'node:*', 'svelte', 'svelte/*', '@sveltejs/*', 'sequelize', 'zod'],
				message: 'The numeric core imports nothing of the application.'
			},
			{
				regex: '^(\\.\\./)+(server|components|schemas|format|editor)/',
				message: 'The numeric core imports nothing of the application.'
			}
		]
	),
	direction(
		['src/lib/{schemas,format,editor,components}/**'],
		[typesOnly(SERVER, 'Only types come from the server side.'), SEQUELIZE]
	),
	direction(
		['src/routes/**'],
		[
			MODELS,
			SEQUELIZE,
			{
				group: ['$lib/server/db', '$lib/server/record'],
				message: 'Writes and queries belong in a service.'
			}
		]
	),
	direction(
		['src/lib/server/models/**/*.ts'],
		[
			{
				group: ['$lib/server/services/*', '**/services/*'],
				message: 'Models carry no rules of the product.'
			},
			{
				group: ['$app/*', '$env/*', '@sveltejs/kit'],
				message: 'Also runs in the worker, which has no Kit.'
			}
		]
	),
	direction(
		['src/lib/server/**/*.ts'],
		[
			{
				group: ['$app/*', '$env/*', '@sveltejs/kit'],
				message: 'Also runs in the worker, which has no Kit.'
			}
		],
		['src/lib/server/models/**', 'src/lib/server/http/**', 'src/lib/server/hooks/**']
	)
);
