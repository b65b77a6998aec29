import { hash } from '@node-rs/argon2';
import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';
import { DEFAULT_PREFERENCES } from '../src/lib/schemas/preferences';
import { ACCOUNTS, personOf, SHOPS } from './demo/people';
import { at, demoId, insertMissing } from './demo/rows';

const inches = (sixtyFourths: number) => (sixtyFourths / 64) * 25.4;

/** Thickness in mm and how many lie on the shelf; the shop buys both kinds. */
const SHIMS = [
	...[
		[0.5, 12],
		[1, 16],
		[1.5, 14],
		[2, 10],
		[3, 8],
		[5, 4]
	].map(([thickness = 0, count = 0]) => ({ unit: 'mm', thickness, count })),
	...[
		[2, 8],
		[4, 10],
		[8, 6]
	].map(([sixtyFourths = 0, count = 0]) => ({ unit: 'in', thickness: inches(sixtyFourths), count }))
];

/** Shops, people, memberships and the shim stock of the demo. */
export const up: MigrationFn<QueryInterface> = async ({ context }) => {
	const created_at = at('2026-01-12');
	await insertMissing(
		context,
		'shops',
		['id'],
		SHOPS.map((shop) => ({ ...shop, technicians_see_all: false, created_at }))
	);
	for (const { id, name, email, password, role, shopId } of ACCOUNTS) {
		const preferences = JSON.stringify(
			role === 'technician' ? { ...DEFAULT_PREFERENCES, angle: 'minutes' } : DEFAULT_PREFERENCES
		);
		await insertMissing(
			context,
			'people',
			['id'],
			[{ id, name, email, password_hash: await hash(password), preferences, demo: true, created_at }]
		);
		await insertMissing(
			context,
			'memberships',
			['shop_id', 'person_id'],
			[{ shop_id: shopId, person_id: id, role, created_at }]
		);
	}
	const [shop] = SHOPS;
	const shelf = { shop_id: shop.id, version: 1, updated_at: at('2026-10-20'), updated_by: personOf('builder') };
	const [found] = await context.sequelize.query('SELECT 1 FROM shim_shelves WHERE shop_id = :shop', {
		replacements: { shop: shop.id }
	});
	if (found.length > 0) return;
	await insertMissing(context, 'shim_shelves', ['shop_id'], [shelf]);
	await insertMissing(
		context,
		'shims',
		['id'],
		SHIMS.map((shim) => ({ id: demoId(`shim ${shim.unit} ${shim.thickness}`), shop_id: shop.id, ...shim }))
	);
};
