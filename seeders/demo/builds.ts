import type { AxleDocument } from '../../src/lib/schemas/axle';
import type { Stage } from '../../src/lib/schemas/build';
import { STAGES } from '../../src/lib/schemas/build';
import { COUPE_REVISIONS, PICKUP } from './others';
import { SHOPS } from './people';
import { at, demoId } from './rows';
import { ROADSTER_REVISIONS } from './roadster';

interface DemoRevision {
	day: string;
	note: string;
	document: AxleDocument;
}

export interface DemoBuild {
	id: string;
	shopId: string;
	facts: Record<string, string | number | null>;
	stage: Stage;
	started: string;
	/** Oldest first; the draft stands at the last one unless given. */
	revisions: DemoRevision[];
	draft: AxleDocument;
	/** Number of the revision released, and the day. */
	released: { number: number; day: string } | null;
	/** Roles of the demo's people who may see it. */
	people: ('technician' | 'client')[];
}

const [quill, northgate] = SHOPS;
const last = (revisions: DemoRevision[]) => revisions[revisions.length - 1]?.document ?? PICKUP;
const masses = (front: number, rear: number, unsprung: number) => ({
	front_mass: front,
	rear_mass: rear,
	unsprung_corner_mass: unsprung
});
const ground = JSON.stringify({ origin: 'ground', height: 0, foreAft: 'fore', foreOrigin: 0 });
const table = JSON.stringify({ origin: 'table', height: 125, foreAft: 'fore', foreOrigin: 0 });
const rail = JSON.stringify({ origin: 'rail', height: 260, foreAft: 'aft', foreOrigin: 0 });

export const ROADSTER_ID = demoId('build roadster');
export const PICKUP_ID = demoId('build pick-up');
export const COUPE_ID = demoId('build coupe');
export const NEIGHBOUR_ID = demoId('build neighbour');

export const BUILDS: DemoBuild[] = [
	{
		id: ROADSTER_ID,
		shopId: quill.id,
		facts: {
			name: 'Grey roadster',
			client: 'P. Sandvoll',
			datum: table,
			wheelbase: 2600,
			track: 1420,
			tyre_size: '205/60R15',
			loaded_radius: 300,
			ride_height: 145,
			...masses(560, 545, 35),
			cg_height: 480,
			front_brake_share: 0.64,
			notes:
				'Rear track 1430 from the donor axle. Hood line clears the upper ball joint by 40 at full bump. Brackets for revision D are cut.'
		},
		stage: 'inFabrication',
		started: '2026-08-17',
		revisions: ROADSTER_REVISIONS,
		draft: last(ROADSTER_REVISIONS),
		released: { number: 4, day: '2026-09-28' },
		people: ['technician', 'client']
	},
	{
		id: PICKUP_ID,
		shopId: quill.id,
		facts: {
			name: 'Shop pick-up',
			client: '',
			datum: rail,
			wheelbase: 3050,
			track: 1640,
			tyre_size: '235/75R15',
			loaded_radius: 345,
			ride_height: 260,
			...masses(850, 640, 45),
			cg_height: 610,
			front_brake_share: 0.68,
			notes: 'Own truck, between jobs. Upper arms on rod ends.'
		},
		stage: 'laidOut',
		started: '2026-10-05',
		revisions: [],
		draft: PICKUP,
		released: null,
		people: []
	},
	{
		id: COUPE_ID,
		shopId: quill.id,
		facts: {
			name: 'Long coupe',
			client: 'R. Abendroth',
			datum: ground,
			wheelbase: 2720,
			track: 1500,
			tyre_size: '205/55R16',
			loaded_radius: 310,
			ride_height: 150,
			...masses(650, 610, 35),
			cg_height: 520,
			front_brake_share: 0.62,
			notes: 'Settled 4 mm after the first week on the road.'
		},
		stage: 'onItsWheels',
		started: '2026-03-02',
		revisions: COUPE_REVISIONS,
		draft: last(COUPE_REVISIONS),
		released: { number: 2, day: '2026-04-07' },
		people: ['technician']
	},
	{
		id: NEIGHBOUR_ID,
		shopId: northgate.id,
		facts: {
			name: 'Blue saloon',
			client: 'T. Weir',
			datum: ground,
			tyre_size: '',
			notes: '',
			wheelbase: null,
			track: 1480
		},
		stage: 'quoted',
		started: '2026-11-02',
		revisions: [],
		draft: PICKUP,
		released: null,
		people: []
	}
];

/** The row of a build as its table has it. */
export function buildRow({ id, shopId, facts, stage, started, revisions }: DemoBuild) {
	const numbers = {
		wheelbase: null,
		track: null,
		loaded_radius: null,
		ride_height: null,
		front_mass: null,
		rear_mass: null
	};
	return {
		...numbers,
		unsprung_corner_mass: null,
		cg_height: null,
		front_brake_share: null,
		...facts,
		id,
		shop_id: shopId,
		stage,
		stage_order: STAGES.indexOf(stage),
		archived: false,
		archived_at: null,
		created_at: at(started),
		updated_at: at(revisions[revisions.length - 1]?.day ?? started, '16:10')
	};
}
