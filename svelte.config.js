import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	kit: {
		adapter: adapter({ out: 'build' }),
		alias: { $tests: 'tests', $demo: 'src/demo' },
		csrf: { trustedOrigins: [] },
		typescript: {
			config: (config) => {
				config.include.push('../tests/**/*.ts', '../*.ts', '../*.js');
				return config;
			}
		}
	}
};
