import { settings } from '$lib/server/settings';

export type LinkKind = 'invitation' | 'reset' | 'first';

/** The one-time address a mail or a command hands over. */
export function linkTo(kind: LinkKind, secret: string, origin = settings().origin): string {
	return new URL(`/${kind}/${secret}`, origin).href;
}

/**
 * A mail's text for readers of the outbox. Whoever holds a reset's address can take the account
 * over, a PI's too, so with a real mail server only the addressee ever sees it. With the local
 * catcher the outbox is the only place where anybody can read mail, and an installation without
 * a mail server could not invite or reset at all; there the text is shown as it is, and the page
 * says so.
 */
export function hideLinks(text: string): string {
	return text.replace(
		/\/(invitation|reset|first)\/[\w-]{20,}/g,
		'/$1/(hidden: only the addressee sees it)'
	);
}
