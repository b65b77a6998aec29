const BASE = 'http://here.invalid';

/** Where to go after sign-in: a path of this application, or `fallback`. Anything that could lead elsewhere is dropped. */
export function localPath(next: string | null | undefined, fallback: string): string {
	if (!next || !next.startsWith('/') || /[\\\s\p{Cc}]/u.test(next)) return fallback;
	try {
		const url = new URL(next, BASE);
		if (url.origin !== BASE || url.pathname.startsWith('//') || /^\/(sign-(in|up|out)|api)(\/|$)/.test(url.pathname))
			return fallback;
		return url.pathname + url.search + url.hash;
	} catch {
		return fallback;
	}
}
