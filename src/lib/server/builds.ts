import { Op, QueryTypes } from 'sequelize';
import type { Order, Transaction, WhereOptions } from 'sequelize';
import { revisionLetter } from '../domain/letters';
import type { AxleDocument } from '../schemas/axle';
import { STAGES } from '../schemas/build';
import type { BuildFacts, BuildInput, BuildList, BuildListQuery, BuildPatch, BuildPerson } from '../schemas/build';
import type { Actor } from './actor';
import { note } from './audit';
import { Build, BuildPersonRow, database, Draft, Membership, Person } from './db';
import { carryFacts, newDocument } from './carry';
import { canonical, readDocument } from './documents';
import { newId } from './ids';
import { seesEverything } from './policy';
import { refuseFields } from './problem';
import { viewFor } from './serializers';
import type { BuildWhole } from './serializers';
import { findBuild, visibleBuilds } from './visibility';

export const PAGE_SIZE = 25;

const LIST_COLUMNS = ['id', 'name', 'client', 'stage', 'archivedAt', 'updatedAt'];

/** One page of the builds the actor may know of. */
export async function listBuilds(actor: Actor, query: BuildListQuery): Promise<BuildList> {
	const where = listWhere(actor, query);
	const total = await Build.count({ where });
	const pages = Math.max(1, Math.ceil(total / PAGE_SIZE));
	const page = Math.min(query.page, pages);
	const rows = await Build.findAll({
		attributes: LIST_COLUMNS,
		where,
		order: listOrder(actor, query),
		limit: PAGE_SIZE,
		offset: (page - 1) * PAGE_SIZE
	});
	const letters = await newestLetters(
		actor,
		rows.map(({ id }) => id)
	);
	const items = rows.map((row) =>
		viewFor(actor.role).listItem({
			id: row.id,
			name: row.name,
			client: row.client,
			stage: row.stage,
			letter: letters.get(row.id) ?? null,
			archivedAt: row.archivedAt?.toISOString() ?? null,
			updatedAt: row.updatedAt.toISOString()
		})
	);
	return { items, total, page, pages };
}

function listWhere(actor: Actor, { q, stage, archived }: BuildListQuery): WhereOptions<Build> {
	const parts: WhereOptions<Build>[] = [visibleBuilds(actor), { archived: archived === 'yes' }];
	if (stage) parts.push({ stageOrder: STAGES.indexOf(stage) });
	if (q) {
		const like = { [Op.like]: `%${q.replace(/[\\%_]/g, '\\$&')}%` };
		// A technician is not told whose car it is, so may not find out by searching either.
		parts.push(actor.role === 'technician' ? { name: like } : { [Op.or]: [{ name: like }, { client: like }] });
	}
	return { [Op.and]: parts };
}

function listOrder(actor: Actor, { sort, dir }: BuildListQuery): Order {
	const way = (dir ?? (sort === 'updated' ? 'down' : 'up')) === 'up' ? 'ASC' : 'DESC';
	const shown = sort === 'client' && actor.role === 'technician' ? 'name' : sort;
	if (shown === 'stage')
		return [
			['stageOrder', way],
			['updatedAt', way],
			['id', way]
		];
	return [
		[shown === 'updated' ? 'updatedAt' : shown, way],
		['id', way]
	];
}

async function newestLetters(actor: Actor, buildIds: string[]): Promise<Map<string, string>> {
	if (buildIds.length === 0) return new Map();
	const onlyReleased = seesEverything(actor.role) ? '' : 'JOIN releases ON releases.revision_id = revisions.id ';
	const rows = await database().query<{ build_id: string; newest: number }>(
		`SELECT revisions.build_id, MAX(revisions.number) AS newest FROM revisions ${onlyReleased}` +
			'WHERE revisions.build_id IN (:buildIds) GROUP BY revisions.build_id',
		{ type: QueryTypes.SELECT, replacements: { buildIds } }
	);
	return new Map(rows.map((row) => [row.build_id, revisionLetter(Number(row.newest))]));
}

/** A build as the actor may see it; 404 when it is not theirs to know of. */
export async function readBuild(actor: Actor, buildId: string): Promise<BuildFacts> {
	return toFacts(actor, await findBuild(actor, buildId));
}

/** Makes a build with an empty draft that already holds its track, wheelbase and the like. */
export async function createBuild(actor: Actor, input: BuildInput, people: string[] = []): Promise<BuildFacts> {
	const build = await database().transaction(async (transaction) => {
		const now = new Date();
		const made = await Build.create(
			{
				id: newId(),
				shopId: actor.shopId,
				...columns(input),
				archived: false,
				archivedAt: null,
				createdAt: now,
				updatedAt: now
			},
			{ transaction }
		);
		await Draft.create(
			{
				shopId: actor.shopId,
				buildId: made.id,
				version: 1,
				document: canonical(newDocument(input)),
				parentNumber: null,
				updatedAt: now,
				updatedBy: actor.personId
			},
			{ transaction }
		);
		await assign(actor, made.id, people, transaction);
		return made;
	});
	await note(actor, 'build.created', { buildId: build.id });
	return toFacts(actor, build);
}

/** Changes the given facts only; the draft follows where it still held the old fact. */
export async function changeBuild(actor: Actor, buildId: string, patch: BuildPatch): Promise<BuildFacts> {
	const { archived, people, ...changed } = patch;
	const build = await database().transaction(async (transaction) => {
		const row = await findBuild(actor, buildId, transaction, true);
		const before = toInput(row);
		const after = { ...before, ...changed };
		const now = new Date();
		row.set({ ...columns(after), updatedAt: now });
		if (archived !== undefined && archived !== row.archived) row.set({ archived, archivedAt: archived ? now : null });
		await row.save({ transaction });
		await carryToDraft(actor, row, before, after, transaction);
		if (people) await assign(actor, buildId, people, transaction);
		return row;
	});
	if (archived !== undefined) await note(actor, archived ? 'build.archived' : 'build.restored', { buildId });
	if (people) await note(actor, 'build.people', { buildId });
	return toFacts(actor, build);
}

async function carryToDraft(
	actor: Actor,
	build: Build,
	before: BuildInput,
	after: BuildInput,
	transaction: Transaction
): Promise<void> {
	const draft = await Draft.findOne({ where: { shopId: actor.shopId, buildId: build.id }, transaction, lock: true });
	if (!draft) return;
	const document: AxleDocument = readDocument(draft.document);
	const carried = canonical(carryFacts(document, before, after));
	if (carried === draft.document) return;
	await draft.update(
		{ document: carried, version: draft.version + 1, updatedAt: build.updatedAt, updatedBy: actor.personId },
		{ transaction }
	);
}

/** Sets exactly these people as the build's technicians and clients; anyone else in the list is refused by name of the field. */
async function assign(actor: Actor, buildId: string, people: string[], transaction: Transaction): Promise<void> {
	const wanted = [...new Set(people)];
	const { shopId } = actor;
	const known = await Membership.count({
		where: { shopId, personId: wanted, role: ['technician', 'client'] },
		transaction
	});
	if (known !== wanted.length)
		refuseFields([{ field: 'people', message: 'People: technicians and clients of this shop only.' }]);
	await BuildPersonRow.destroy({ where: { shopId, buildId, personId: { [Op.notIn]: wanted } }, transaction });
	const createdAt = new Date();
	await BuildPersonRow.bulkCreate(
		wanted.map((personId) => ({ shopId, buildId, personId, createdAt })),
		{ ignoreDuplicates: true, transaction }
	);
}

async function readPeople(actor: Actor, buildId: string): Promise<BuildPerson[]> {
	const rows = await Membership.findAll({
		where: {
			shopId: actor.shopId,
			personId: (
				await BuildPersonRow.findAll({ attributes: ['personId'], where: { shopId: actor.shopId, buildId } })
			).map((row) => row.personId)
		},
		include: { model: Person, as: 'person', attributes: ['name'] },
		order: [[{ model: Person, as: 'person' }, 'name', 'ASC']]
	});
	return rows.map(({ personId, role, person }) => ({
		id: personId,
		name: person?.name ?? '',
		role: role === 'client' ? 'client' : 'technician'
	}));
}

async function toFacts(actor: Actor, row: Build): Promise<BuildFacts> {
	const whole: BuildWhole = {
		id: row.id,
		...toInput(row),
		people: seesEverything(actor.role) ? await readPeople(actor, row.id) : [],
		archivedAt: row.archivedAt?.toISOString() ?? null,
		updatedAt: row.updatedAt.toISOString()
	};
	return viewFor(actor.role).build(whole);
}

function toInput(row: Build): BuildInput {
	return {
		name: row.name,
		client: row.client,
		stage: row.stage,
		datum: JSON.parse(row.datum) as BuildInput['datum'],
		wheelbase: row.wheelbase,
		track: row.track,
		tyreSize: row.tyreSize,
		loadedRadius: row.loadedRadius,
		rideHeight: row.rideHeight,
		frontMass: row.frontMass,
		rearMass: row.rearMass,
		unsprungCornerMass: row.unsprungCornerMass,
		cgHeight: row.cgHeight,
		frontBrakeShare: row.frontBrakeShare,
		notes: row.notes
	};
}

function columns(input: BuildInput) {
	return { ...input, datum: JSON.stringify(input.datum), stageOrder: STAGES.indexOf(input.stage) };
}
