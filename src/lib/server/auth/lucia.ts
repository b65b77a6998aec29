import { Lucia, TimeSpan } from 'lucia';
import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import { Op } from 'sequelize';
import { Person, Session } from '../db';
import { sha256 } from '../ids';

/** A session ends after this long unused … */
export const IDLE = new TimeSpan(12, 'h');
/** … and at the latest this long after sign-in. */
export const MAX_LIFE = new TimeSpan(30, 'd');
// Use is noted at most once in this time, or every request would write.
const NOTE_EVERY = new TimeSpan(1, 'm');

interface PersonAttributes {
	name: string;
	email: string;
	preferences: string;
}

declare module 'lucia' {
	interface Register {
		Lucia: Lucia<Record<never, never>, PersonAttributes>;
		DatabaseUserAttributes: PersonAttributes;
	}
}

/** Latest moment a session begun at `createdAt` may live to when it is used at `now`. */
function expiry(createdAt: Date, now: number): Date {
	return new Date(Math.min(now + IDLE.milliseconds(), createdAt.getTime() + MAX_LIFE.milliseconds()));
}

/** Lucia's view of our tables. The database holds the hash of a session's id; the id itself comes from the cookie. */
const adapter: Adapter = {
	async getSessionAndUser(id): Promise<[DatabaseSession | null, DatabaseUser | null]> {
		const row = await Session.findByPk(sha256(id), { include: { model: Person, as: 'person' } });
		if (!row?.person) return [null, null];
		const { person } = row;
		const now = Date.now();
		const extended = expiry(row.createdAt, now);
		if (row.expiresAt.getTime() > now && extended.getTime() - row.expiresAt.getTime() > NOTE_EVERY.milliseconds()) {
			row.expiresAt = extended;
			await row.save({ fields: ['expiresAt'] });
		}
		return [
			{ id, userId: person.id, expiresAt: row.expiresAt, attributes: {} },
			{ id: person.id, attributes: { name: person.name, email: person.email, preferences: person.preferences } }
		];
	},
	async getUserSessions(personId) {
		const rows = await Session.findAll({ where: { personId } });
		return rows.map((row) => ({ id: row.idHash, userId: row.personId, expiresAt: row.expiresAt, attributes: {} }));
	},
	async setSession({ id, userId }) {
		const createdAt = new Date();
		await Session.create({
			idHash: sha256(id),
			personId: userId,
			createdAt,
			expiresAt: expiry(createdAt, createdAt.getTime())
		});
	},
	async updateSessionExpiration(id) {
		// Lucia asks when less than half the idle time is left; the row was already extended as far as its age allows.
		const row = await Session.findByPk(sha256(id));
		if (row) await row.update({ expiresAt: expiry(row.createdAt, Date.now()) });
	},
	async deleteSession(id) {
		await Session.destroy({ where: { idHash: sha256(id) } });
	},
	async deleteUserSessions(personId) {
		await Session.destroy({ where: { personId } });
	},
	async deleteExpiredSessions() {
		await Session.destroy({ where: { expiresAt: { [Op.lte]: new Date() } } });
	}
};

export const lucia = new Lucia(adapter, {
	sessionExpiresIn: IDLE,
	getUserAttributes: ({ name, email, preferences }) => ({ name, email, preferences })
});
