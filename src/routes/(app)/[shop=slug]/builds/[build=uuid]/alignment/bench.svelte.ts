import { axleGeometry, rightCorner } from '$lib/domain/axle';
import type { AxleTask, SideAnswer, SideName, WheelAnswer } from '$lib/domain/alignment/answer';
import type { Measured } from '$lib/domain/alignment/asFound';
import { casterFromSweep, type SweepCaster } from '$lib/domain/alignment/casterSweep';
import { standOf, type Stand } from '$lib/domain/alignment/stand';
import { solveCorner, type CornerGeometry } from '$lib/kinematics';
import type { AxleDocument } from '$lib/schemas/axle';
import type { BuildFacts } from '$lib/schemas/build';
import type { AlignmentRecord, RecordInput, WheelRecord } from '$lib/schemas/record';
import type { Shim } from '$lib/schemas/shims';

export const SIDES: readonly SideName[] = ['left', 'right'];

/** Camber read at two steer angles; null where it is not typed yet. */
export interface SweepEntry {
	steerA: number | null;
	camberA: number | null;
	steerB: number | null;
	camberB: number | null;
}

/** What was read on one wheel, or set. Degrees; mm; turns. */
export interface WheelEntry {
	camber: number | null;
	caster: number | null;
	toe: number | null;
	sweep: SweepEntry;
	frontPack: number | null;
	rearPack: number | null;
}

export type Entries = Record<SideName, WheelEntry>;

const noSweep = (): SweepEntry => ({ steerA: null, camberA: null, steerB: null, camberB: null });
const noEntry = (): WheelEntry => ({
	camber: null,
	caster: null,
	toe: null,
	sweep: noSweep(),
	frontPack: null,
	rearPack: null
});
export const noEntries = (): Entries => ({ left: noEntry(), right: noEntry() });

/** What the bench reads; getters, so that it follows them. */
export interface BenchSource {
	readonly document: AxleDocument;
	readonly build: Pick<BuildFacts, 'rideHeight' | 'wheelbase'>;
	readonly stock: readonly Shim[];
}

/** The car on the plates: how it stands, what was read on it, and the task that follows. */
export class Bench {
	frontHeight = $state<number | null>(null);
	rearHeight = $state<number | null>(null);
	/** Rear height in the design, where the frame line is not level; null: as at the front. */
	designRearHeight = $state<number | null>(null);
	/** Taken from a record in place of heights. */
	recorded = $state<{ travel: number; rake: number } | null>(null);
	found = $state<Entries>(noEntries());
	set = $state<Entries>(noEntries());
	readonly #source: BenchSource;

	readonly #solved = $derived.by(() => axleGeometry(this.#source.document));
	readonly missing = $derived('missing' in this.#solved ? this.#solved.missing : null);
	readonly corners = $derived<Record<SideName, CornerGeometry> | null>(
		'axle' in this.#solved ? { left: this.#solved.left, right: rightCorner(this.#solved.axle) } : null
	);
	readonly wheelbase = $derived.by(() => this.#source.document.vehicle.wheelbase ?? this.#source.build.wheelbase);
	readonly stand = $derived.by<Stand>(() => {
		const { frontHeight, rearHeight, designRearHeight, recorded } = this;
		if (frontHeight === null && rearHeight === null && recorded) return { ...recorded, unknown: [] };
		const design = {
			frontHeight: this.#source.build.rideHeight,
			rearHeight: designRearHeight,
			wheelbase: this.wheelbase
		};
		return standOf({ frontHeight, rearHeight }, design);
	});

	/** What has to be worked out; null while points are missing. */
	readonly task = $derived.by<AxleTask | null>(() => {
		const { corners } = this;
		if (!corners) return null;
		const { adjusters, alignment } = this.#source.document;
		return {
			adjusters,
			stance: { travel: this.stand.travel, rake: this.stand.rake },
			stock: [...this.#source.stock],
			wheels: SIDES.map((side) => ({
				side,
				geometry: corners[side],
				targets: alignment[side],
				measured: this.measured(side)
			}))
		};
	});

	constructor(source: BenchSource) {
		this.#source = source;
	}

	/** Caster from this wheel's sweep for its own kpi, or null while a reading is missing. */
	swept(side: SideName, entries: Entries): SweepCaster | null {
		const { steerA, camberA, steerB, camberB } = entries[side].sweep;
		if (steerA === null || camberA === null || steerB === null || camberB === null) return null;
		const kpi = this.kpi(side, entries);
		if (kpi === null) return null;
		return casterFromSweep(side, { steer: steerA, camber: camberA }, { steer: steerB, camber: camberB }, kpi);
	}

	/**
	 * Kingpin inclination of this wheel, degrees: the model's included angle less the camber that was read, since a shim
	 * that changes camber changes kpi by as much.
	 */
	kpi(side: SideName, entries: Entries): number | null {
		const geometry = this.corners?.[side];
		if (!geometry) return null;
		try {
			const { kpi, camber } = solveCorner(geometry, { travel: this.stand.travel, rack: 0 });
			return kpi + camber - (entries[side].camber ?? camber);
		} catch {
			return null;
		}
	}

	/** Caster as read: typed, or from the sweep. */
	caster(side: SideName, entries: Entries): number | null {
		const swept = this.swept(side, entries);
		return entries[side].caster ?? (swept?.ok ? swept.caster : null);
	}

	/** The as-found readings of a wheel; null where nothing was read. */
	measured(side: SideName): Measured | null {
		const { camber, toe, frontPack, rearPack } = this.found[side];
		const caster = this.caster(side, this.found);
		const read = { camber, caster, toe, frontPack, rearPack };
		return Object.values(read).some((value) => value !== null) ? read : null;
	}

	/** The body of a record. `turns` are those that were set, for a car with rod ends. */
	record(
		kind: RecordInput['kind'],
		note: string,
		requestId: string,
		answers: readonly SideAnswer[] | null
	): RecordInput {
		const entries = kind === 'asFound' ? this.found : this.set;
		const { travel, rake } = this.stand;
		const wheel = (side: SideName): WheelRecord => {
			const { camber, toe, sweep, frontPack, rearPack } = entries[side];
			const { steerA, camberA, steerB, camberB } = sweep;
			const whole = steerA !== null && camberA !== null && steerB !== null && camberB !== null;
			const answer = answers?.find((one): one is WheelAnswer => one.side === side && !('failed' in one));
			const turned = kind === 'asSet' ? answer?.chosen : null;
			return {
				camber,
				caster: this.caster(side, entries),
				toe,
				sweep: whole ? { steerA, camberA, steerB, camberB } : null,
				frontPack,
				rearPack,
				frontTurns: turned?.front.turns ?? null,
				rearTurns: turned?.rear.turns ?? null,
				tieRodTurns: kind === 'asSet' ? (answer?.tieRod?.turns ?? null) : null
			};
		};
		return { kind, requestId, note, travel, rake, left: wheel('left'), right: wheel('right') };
	}

	/** Puts the readings of a record back on the bench. */
	take(record: AlignmentRecord): void {
		const entry = (wheel: WheelRecord): WheelEntry => ({
			camber: wheel.camber,
			// A swept caster is read from its sweep again.
			caster: wheel.sweep ? null : wheel.caster,
			toe: wheel.toe,
			sweep: wheel.sweep ? { ...wheel.sweep } : noSweep(),
			frontPack: wheel.frontPack,
			rearPack: wheel.rearPack
		});
		this.found = { left: entry(record.left), right: entry(record.right) };
		this.frontHeight = null;
		this.rearHeight = null;
		this.recorded = record.travel === null ? null : { travel: record.travel, rake: record.rake ?? 0 };
	}

	clearFound(): void {
		this.found = noEntries();
	}
}
