let common: Promise<Set<string>> | null = null;

async function load(): Promise<Set<string>> {
	const { dictionary } = await import('@zxcvbn-ts/language-common');
	return new Set(dictionary['passwords-common'].map((word) => word.toLowerCase()));
}

/** The shortest text whose repetition gives the whole. */
function unitOf(text: string): string {
	return text.slice(0, (text + text).indexOf(text, 1));
}

/**
 * Why a password of good length is still too easy to guess, or null: on the list of common passwords (alone, doubled
 * or with digits and signs at its ends), a short pattern repeated, or the person's own name, address or shop.
 */
export async function easyPassword(password: string, own: string[]): Promise<string | null> {
	common ??= load();
	const words = await common;
	const text = password.toLowerCase();
	const bare = text.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');
	const unit = unitOf(text);
	if (unit.length < text.length && (unit.length <= 4 || words.has(unit)))
		return 'This password repeats one short pattern; use a few different words.';
	if (words.has(text) || (bare.length >= text.length - 4 && words.has(bare)))
		return 'This password is on the list of common ones; use a few words that only you put together.';
	if (
		own.some(
			(word) =>
				word.length >= 4 && text.replace(/[^\p{L}\p{N}]/gu, '') === word.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '')
		)
	)
		return 'This password is your own name, address or shop; use a few words that do not belong together.';
	return null;
}
