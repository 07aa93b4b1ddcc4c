import { svelteTesting } from '@testing-library/svelte/vite';
import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/**
 * Threads are built apart: a `new Worker(new URL(...))` inside the server bundle
 * points at a file that the server build does not emit.
 */
const threads = defineConfig({
	resolve: { alias: { $lib: at('./src/lib') } },
	build: {
		ssr: true,
		outDir: `${process.env.QUARTERTURN_BUILD ?? 'build/by-hand'}/threads`,
		emptyOutDir: true,
		rollupOptions: { input: { thread: at('./src/lib/server/jobs/thread.ts') } }
	}
});

const app = defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	test: {
		projects: [
			{
				extends: true,
				test: {
					name: 'unit',
					environment: 'node',
					testTimeout: 30_000,
					include: ['src/**/*.test.ts'],
					exclude: ['src/**/*.svelte.test.ts']
				}
			},
			{
				extends: true,
				plugins: [svelteTesting()],
				test: {
					name: 'component',
					environment: 'jsdom',
					testTimeout: 30_000,
					include: ['src/**/*.svelte.test.ts']
				}
			},
			{
				extends: true,
				test: {
					name: 'database',
					environment: 'node',
					include: ['tests/server/**/*.test.ts', 'tests/routes/**/*.test.ts'],
					globalSetup: ['tests/server/setup/cluster.ts'],
					setupFiles: ['tests/server/setup/worker.ts'],
					testTimeout: 60_000,
					hookTimeout: 120_000,
					maxWorkers: 2
				}
			}
		]
	}
});

export default defineConfig(({ mode }) => (mode === 'threads' ? threads : app));
