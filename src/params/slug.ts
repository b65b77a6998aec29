/** A shop's name in the address: lower-case letters, digits and single hyphens. */
export function match(value: string): boolean {
	return value.length <= 60 && /^[a-z0-9]+(-[a-z0-9]+)*$/.test(value);
}
