import { createHash } from 'node:crypto';
import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';
import { canonicalAxle } from '../src/lib/domain/axle';
import { solveDocument } from '../src/lib/server/documents';
import { releasedFigures } from '../src/lib/server/figures';
import { buildRow, BUILDS, type DemoBuild } from './demo/builds';
import { ACCOUNTS, personOf } from './demo/people';
import { at, demoId, insertMissing } from './demo/rows';

const builder = personOf('builder');
const sha256 = (bytes: string) => createHash('sha256').update(bytes).digest('hex');
const revisionId = (build: DemoBuild, number: number) => demoId(`revision ${build.id} ${number}`);

/** Builds with their people, revisions, releases and drafts. A build that is there already is left alone with all it holds. */
export const up: MigrationFn<QueryInterface> = async ({ context }) => {
	for (const build of BUILDS) {
		const [found] = await context.sequelize.query('SELECT 1 FROM drafts WHERE build_id = :id', {
			replacements: { id: build.id }
		});
		if (found.length > 0) continue;
		await insertMissing(context, 'builds', ['id'], [buildRow(build)]);
		const created_at = at(build.started);
		await insertMissing(
			context,
			'build_people',
			['build_id', 'person_id'],
			build.people.map((role) => ({ shop_id: build.shopId, build_id: build.id, person_id: personOf(role), created_at }))
		);
		await addRevisions(context, build);
		await addDraft(context, build);
	}
};

async function addRevisions(context: QueryInterface, build: DemoBuild): Promise<void> {
	const owned = { shop_id: build.shopId, build_id: build.id };
	const rows = build.revisions.map(({ day, note, document }, index) => {
		const bytes = canonicalAxle(document);
		return {
			id: revisionId(build, index + 1),
			...owned,
			number: index + 1,
			parent_number: index === 0 ? null : index,
			note,
			document: bytes,
			hash: sha256(bytes),
			request_id: demoId(`request ${build.id} ${index + 1}`),
			created_at: at(day, '16:10'),
			created_by: builder
		};
	});
	await insertMissing(context, 'revisions', ['id'], rows);
	const released = build.released && build.revisions[build.released.number - 1];
	if (!build.released || !released) return;
	const { kernelVersion, ...figures } = releasedFigures(solveDocument(released.document));
	const release = {
		id: demoId(`release ${build.id}`),
		...owned,
		revision_id: revisionId(build, build.released.number),
		figures: JSON.stringify(figures),
		kernel_version: kernelVersion,
		released_at: at(build.released.day, '10:00'),
		released_by: personOf('owner')
	};
	await insertMissing(context, 'releases', ['id'], [release]);
}

async function addDraft(context: QueryInterface, build: DemoBuild): Promise<void> {
	const { shopId, id, draft, revisions, started } = build;
	const parent = revisions.length || null;
	const author = ACCOUNTS.find(
		(account) => account.shopId === shopId && (account.role === 'builder' || account.email.startsWith('neighbour'))
	);
	const updated_at = at(revisions[revisions.length - 1]?.day ?? started, '16:10');
	const row = {
		shop_id: shopId,
		build_id: id,
		version: 1,
		document: canonicalAxle(draft),
		parent_number: parent,
		updated_at
	};
	await insertMissing(context, 'drafts', ['build_id'], [{ ...row, updated_by: author?.id ?? builder }]);
}
