import { createSubscriber } from 'svelte/reactivity';
import { themes, tokens, type Theme, type Token } from './tokens';

const watchRoot = createSubscriber((update) => {
	const observer = new MutationObserver(update);
	observer.observe(document.documentElement, { attributeFilter: ['data-theme'] });
	return () => observer.disconnect();
});

function isTheme(name: string | undefined): name is Theme {
	return themes.some((theme) => theme === name);
}

/**
 * The theme the page is shown in now. Reactive: what is drawn on canvas has no
 * style sheet and must be drawn again. On the server the fallback is returned.
 */
export function currentTheme(fallback: Theme = 'bench'): Theme {
	if (typeof document === 'undefined') return fallback;
	watchRoot();
	const name = document.documentElement.dataset.theme;
	return isTheme(name) ? name : fallback;
}

/** A colour of the present theme as `#rrggbb`, for canvas. */
export function themeColour(token: Token): string {
	return tokens[currentTheme()][token];
}

/** Shows a theme at once and keeps it for the next page in the cookie. */
export async function chooseTheme(theme: Theme, endpoint: string): Promise<void> {
	document.documentElement.dataset.theme = theme;
	const body = new FormData();
	body.set('theme', theme);
	await fetch(endpoint, { method: 'POST', headers: { accept: 'application/json' }, body });
}

export function nextTheme(theme: Theme): Theme {
	return themes[(themes.indexOf(theme) + 1) % themes.length];
}
