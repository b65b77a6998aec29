import { QueryTypes } from 'sequelize';
import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';
import { recordInputSchema } from '../src/lib/schemas/record';
import { COUPE_ID } from './demo/builds';
import { personOf } from './demo/people';
import { at, demoId, insertMissing } from './demo/rows';

/** The coupe as it stood after its first week on the road, measured by the technician. */
const asFound = {
	kind: 'asFound',
	left: { camber: -0.35, caster: 4.9, toe: 0.18, frontPack: 4.5, rearPack: 3 },
	right: {
		camber: -0.6,
		caster: 5.25,
		toe: 0.1,
		sweep: { steerA: -20, camberA: 1.42, steerB: 20, camberB: -2.18 },
		frontPack: 4.5,
		rearPack: 3
	},
	travel: 4,
	rake: 0.2,
	note: 'Tyres 2.1 bar, half a tank, on the plates. Steering wheel 3 degrees left of straight.'
};

/** One as-found record on the released revision of the coupe. */
export const up: MigrationFn<QueryInterface> = async ({ context }) => {
	const [revision] = await context.sequelize.query<{ id: string; hash: string; shop_id: string }>(
		'SELECT id, hash, shop_id FROM revisions WHERE build_id = :build AND number = 2',
		{ replacements: { build: COUPE_ID }, type: QueryTypes.SELECT }
	);
	if (!revision) return;
	const request_id = demoId('request as found');
	const { kind, requestId: _, ...entry } = recordInputSchema.parse({ requestId: request_id, ...asFound });
	await insertMissing(
		context,
		'alignment_records',
		['id'],
		[
			{
				id: demoId('record as found'),
				shop_id: revision.shop_id,
				build_id: COUPE_ID,
				revision_id: revision.id,
				revision_hash: revision.hash,
				kind,
				entry: JSON.stringify(entry),
				request_id,
				created_at: at('2026-10-29', '11:20'),
				created_by: personOf('technician')
			}
		]
	);
};
