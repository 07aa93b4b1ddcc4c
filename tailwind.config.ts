import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';
import { customProperties, tokens } from './src/lib/components/ui/tokens';

const colors = Object.fromEntries(
	Object.keys(tokens.bench).map((name) => [name, `rgb(var(--${name}) / <alpha-value>)`])
);

/** Paper is lit by daylight, whichever theme the screen has. */
const printed = { '@media print': { ':root[data-theme]': customProperties('bench') } };

export default {
	content: [],
	darkMode: ['selector', '[data-theme="evening"], [data-theme="red"]'],
	theme: {
		extend: {
			colors,
			fontFamily: {
				sans: ['"Atkinson Hyperlegible Next Variable"', 'system-ui', 'sans-serif'],
				mono: ['"Atkinson Hyperlegible Mono Variable"', 'ui-monospace', 'monospace'],
				serif: ['"Literata Variable"', 'Georgia', 'serif']
			},
			fontSize: {
				'2xs': ['0.6875rem', '1rem'],
				xs: ['0.75rem', '1.05rem'],
				sm: ['0.8125rem', '1.15rem'],
				base: ['0.9375rem', '1.4rem'],
				entry: ['1.0625rem', '1.75rem'],
				lg: ['1.0625rem', '1.5rem'],
				xl: ['1.25rem', '1.6rem'],
				'2xl': ['1.625rem', '2rem'],
				'3xl': ['2rem', '2.3rem']
			},
			borderRadius: { chip: '5px', control: '6px', panel: '8px' },
			maxWidth: { entry: '70ch', form: '44rem', page: '100rem' }
		}
	},
	plugins: [
		plugin(({ addBase, addVariant }) => {
			addBase({
				':root, [data-theme="bench"]': { ...customProperties('bench'), colorScheme: 'light' },
				'[data-theme="evening"]': { ...customProperties('evening'), colorScheme: 'dark' },
				'[data-theme="red"]': { ...customProperties('red'), colorScheme: 'dark' },
				...printed
			});
			addVariant('red', '[data-theme="red"] &');
			addVariant('touch', '@media (pointer: coarse)');
		})
	]
} satisfies Config;
