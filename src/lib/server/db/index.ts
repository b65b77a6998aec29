import type { Sequelize } from 'sequelize';
import { connect } from './connection';
import { Build, BuildPersonRow, defineBuilds, Draft } from './models/builds';
import { definePeople, Person, Session } from './models/people';
import { AlignmentRow, defineRevisions, Release, Revision } from './models/revisions';
import { defineShops, Membership, ShimShelf, Shop } from './models/shops';

export * from './models/builds';
export * from './models/people';
export * from './models/revisions';
export * from './models/shops';

// One pool a process: it holds connections, nothing of a request.
let pool: Sequelize | null = null;

/** Opens the application's database and binds the models to it; called once, at start. */
export function openDatabase(databaseUrl: string): Sequelize {
	if (pool) return pool;
	pool = connect(databaseUrl);
	definePeople(pool);
	defineShops(pool);
	defineBuilds(pool);
	defineRevisions(pool);
	associate();
	return pool;
}

/** The open database. */
export function database(): Sequelize {
	if (!pool) throw new Error('The database is not open: openDatabase() runs at start');
	return pool;
}

/** Closes the pool; safe to call twice. */
export async function closeDatabase(): Promise<void> {
	const open = pool;
	pool = null;
	await open?.close();
}

function associate(): void {
	Session.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Membership.belongsTo(Shop, { as: 'shop', foreignKey: 'shopId' });
	Membership.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	ShimShelf.belongsTo(Person, { as: 'author', foreignKey: 'updatedBy' });
	Draft.belongsTo(Person, { as: 'author', foreignKey: 'updatedBy' });
	Build.hasMany(BuildPersonRow, { as: 'people', foreignKey: 'buildId' });
	BuildPersonRow.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Revision.belongsTo(Person, { as: 'author', foreignKey: 'createdBy' });
	Revision.hasOne(Release, { as: 'release', foreignKey: 'revisionId' });
	Release.belongsTo(Person, { as: 'author', foreignKey: 'releasedBy' });
	AlignmentRow.belongsTo(Person, { as: 'author', foreignKey: 'createdBy' });
}
