import type { Role } from '../schemas/auth';
import type { BuildFacts, BuildListItem, BuildPerson, RevisionSummary } from '../schemas/build';
import type { AlignmentRecord } from '../schemas/record';
import type { BuildInput } from '../schemas/build';

/** What the shop itself holds of a build, before it is cut for its reader. */
export interface BuildWhole extends BuildInput {
	id: string;
	people: BuildPerson[];
	archivedAt: string | null;
	updatedAt: string;
}

/** A revision before it is cut; `parentReleased`: the parent too may be named to those who see released revisions only. */
export interface RevisionWhole extends RevisionSummary {
	parentReleased: boolean;
}

/** What one role's JSON contains. */
interface View {
	build(whole: BuildWhole): BuildFacts;
	listItem(item: BuildListItem): BuildListItem;
	revision(whole: RevisionWhole): RevisionSummary;
	record(record: AlignmentRecord): AlignmentRecord;
}

/** Owner and builder: everything. */
const shop: View = {
	build: (whole) => ({ ...facts(whole), client: whole.client, notes: whole.notes, people: whole.people }),
	listItem: (item) => item,
	revision: ({ parentReleased: _, ...summary }) => summary,
	record: (record) => record
};

/** Technician, often of another shop: what setting the car up needs; not whose car it is, nor the shop's own notes. */
const technician: View = {
	build: (whole) => ({ ...facts(whole), client: null, notes: null, people: null }),
	listItem: (item) => ({ ...item, client: null }),
	revision: (whole) => releasedOnly(whole),
	record: (record) => record
};

/** Client: their car and its figures; not the shop's notes, on the build, its revisions or its records. */
const client: View = {
	build: (whole) => ({ ...facts(whole), client: whole.client, notes: null, people: null }),
	listItem: (item) => item,
	revision: (whole) => ({ ...releasedOnly(whole), note: '' }),
	record: (record) => ({ ...record, note: '' })
};

const VIEWS: Record<Role, View> = { owner: shop, builder: shop, technician, client };

/** The view of a role. */
export function viewFor(role: Role): View {
	return VIEWS[role];
}

/** The facts every reader of a build gets, named one by one so that a new column shows up nowhere by itself. */
function facts(whole: BuildWhole): Omit<BuildFacts, 'client' | 'notes' | 'people'> {
	return {
		id: whole.id,
		name: whole.name,
		stage: whole.stage,
		datum: whole.datum,
		wheelbase: whole.wheelbase,
		track: whole.track,
		tyreSize: whole.tyreSize,
		loadedRadius: whole.loadedRadius,
		rideHeight: whole.rideHeight,
		frontMass: whole.frontMass,
		rearMass: whole.rearMass,
		unsprungCornerMass: whole.unsprungCornerMass,
		cgHeight: whole.cgHeight,
		frontBrakeShare: whole.frontBrakeShare,
		archivedAt: whole.archivedAt,
		updatedAt: whole.updatedAt
	};
}

function releasedOnly({ parentReleased, ...summary }: RevisionWhole): RevisionSummary {
	return { ...summary, parentLetter: parentReleased ? summary.parentLetter : null };
}
