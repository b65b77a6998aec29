import type { Role } from '../schemas/auth';

export const ACTS = [
	'build.list',
	'build.read',
	'build.create',
	'build.edit',
	'build.archive',
	'draft.read',
	'draft.write',
	'revision.read',
	'revision.keep',
	'revision.release',
	'record.add',
	'stock.read',
	'stock.edit',
	'shop.settings',
	'members.read'
] as const;
export type Act = (typeof ACTS)[number];

/** yes: may. no: knows of it, may not (403). hidden: does not know of it (404). */
type Word = 'yes' | 'no' | 'hidden';

/** Who may what, once. Columns: owner, builder, technician, client. */
const TABLE: Record<Act, readonly [Word, Word, Word, Word]> = {
	'build.list': ['yes', 'yes', 'yes', 'yes'],
	'build.read': ['yes', 'yes', 'yes', 'yes'],
	'build.create': ['yes', 'yes', 'no', 'no'],
	'build.edit': ['yes', 'yes', 'no', 'no'],
	'build.archive': ['yes', 'yes', 'no', 'no'],
	'draft.read': ['yes', 'yes', 'hidden', 'hidden'],
	'draft.write': ['yes', 'yes', 'hidden', 'hidden'],
	'revision.read': ['yes', 'yes', 'yes', 'yes'],
	'revision.keep': ['yes', 'yes', 'no', 'no'],
	'revision.release': ['yes', 'yes', 'no', 'no'],
	'record.add': ['yes', 'yes', 'yes', 'no'],
	'stock.read': ['yes', 'yes', 'yes', 'no'],
	'stock.edit': ['yes', 'yes', 'no', 'no'],
	'shop.settings': ['yes', 'no', 'no', 'no'],
	'members.read': ['yes', 'yes', 'no', 'no']
};

const COLUMN: Record<Role, 0 | 1 | 2 | 3> = { owner: 0, builder: 1, technician: 2, client: 3 };

/** What the table says of this role and act. */
export function verdict(role: Role, act: Act): Word {
	return TABLE[act][COLUMN[role]];
}

/** True when the role may do the act (on what it may see at all). */
export function can(role: Role, act: Act): boolean {
	return verdict(role, act) === 'yes';
}

/** Every act with yes or no, for pages that show only what works. */
export function abilities(role: Role): Record<Act, boolean> {
	return Object.fromEntries(ACTS.map((act) => [act, can(role, act)])) as Record<Act, boolean>;
}

/** True for the roles that see the shop's own work: drafts, unreleased revisions, every build. */
export function seesEverything(role: Role): boolean {
	return can(role, 'draft.read');
}
