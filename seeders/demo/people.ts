import { DEMO_SIGN_INS } from '../../src/lib/server/demo';
import type { DemoAccount } from '../../src/lib/schemas/auth';
import { demoId } from './rows';

/** The demo's own shop, and a second one that must never see anything of it. */
export const SHOPS = [
	{ id: demoId('shop quill'), slug: 'quill-chassis', name: 'Quill Chassis Works' },
	{ id: demoId('shop northgate'), slug: 'northgate-frames', name: 'Northgate Frames' }
] as const;

/** Owner of the second shop; not shown on the sign-in page. */
export const NEIGHBOUR: DemoAccount = {
	role: 'owner',
	name: 'Bo Tamsin',
	email: 'neighbour@demo.example',
	password: 'the shop next door 5'
};

export const ACCOUNTS = [
	...DEMO_SIGN_INS.map((account) => ({ ...account, id: demoId(account.email), shopId: SHOPS[0].id })),
	{ ...NEIGHBOUR, id: demoId(NEIGHBOUR.email), shopId: SHOPS[1].id }
];

/** Id of the demo's person of a role. */
export function personOf(role: DemoAccount['role']): string {
	return demoId(DEMO_SIGN_INS.find((account) => account.role === role)?.email ?? '');
}
