import type { Handle } from '@sveltejs/kit';
import { settings } from '$lib/server/settings';

/** The content policy is Kit's own (svelte.config.js): it knows the nonces of its scripts. */
const ALWAYS = {
	'x-content-type-options': 'nosniff',
	'x-frame-options': 'DENY',
	// Addresses of invitations and resets hold secrets; none leaves for another site.
	'referrer-policy': 'same-origin',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin',
	'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()'
};

export const protect: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	for (const [name, value] of Object.entries(ALWAYS)) response.headers.set(name, value);
	if (settings().origin.startsWith('https:')) {
		response.headers.set('strict-transport-security', 'max-age=31536000');
	}
	// After sign-out nothing of the record stays behind in a shared browser's cache.
	const isPage = response.headers.get('content-type')?.startsWith('text/html') ?? false;
	if (isPage && !response.headers.has('cache-control')) {
		response.headers.set('cache-control', 'private, no-store');
	}
	return response;
};
