/**
 * A path of this site to go back to, or the front page. Anything a browser could
 * read as another host (`//host`, `/\host`, a scheme) is refused.
 */
export function safePath(wanted: string | null, origin: string): string {
	if (!wanted || !wanted.startsWith('/')) return '/';
	const url = URL.canParse(wanted, origin) ? new URL(wanted, origin) : null;
	if (url?.origin !== origin) return '/';
	return url.pathname + url.search + url.hash;
}
