import { angularDimension, linearDimension, textBox, textWidth, type DimensionLayout, type Spot } from './dimension';
import type { Box } from './layout';
import type { ViewKey } from './projection';
import type { ViewScene } from './scene';
import { VERDICT_ROOM, type Verdict } from './verdict';

/** Figures that stand on the drawing as dimensions. */
export type DimensionKey =
	| 'camber'
	| 'kpi'
	| 'scrubRadius'
	| 'rollCentreHeight'
	| 'track'
	| 'loadedRadius'
	| 'caster'
	| 'mechanicalTrail'
	| 'toe';

/** What a dimension says: the figure as shown, how it stands to its target, and whether it can be typed here. */
export interface DimensionText {
	text: string;
	/** A word under the figure: "per wheel". */
	note?: string;
	name: string;
	verdict: Verdict | null;
	editable: boolean;
}

export interface PlacedDimension extends DimensionText {
	key: DimensionKey;
	layout: DimensionLayout;
	/** Fine lines that the figure is measured from: a plumb line, a wheel plane drawn on. */
	reference: readonly (readonly [number, number, number, number])[];
}

type Texts = Partial<Record<DimensionKey, DimensionText>>;
type Laid = Pick<PlacedDimension, 'layout' | 'reference'>;

const ROW_ONE = 30;
const ROW_TWO = 54;
/** Dimensions keep clear of the window's lower edge, where a hair cross has its figure. */
const EDGE = 24;
const TO_UP = -Math.PI / 2;

const roomFor = (said: DimensionText): number => textWidth(said.text) + (said.verdict ? VERDICT_ROOM : 0);

/**
 * The dimensions of one view, at most seven, each where it belongs. `outward` is the page direction away from the
 * car's centreline (+1 right). A figure without its text, or without the geometry it needs, is left out.
 */
export function viewDimensions(
	view: ViewKey,
	scene: ViewScene,
	box: Box,
	texts: Texts,
	outward: 1 | -1
): PlacedDimension[] {
	const makers: Partial<Record<DimensionKey, (room: number) => Laid | null>> =
		view === 'front'
			? {
					camber: (room) => camber(scene, box, room),
					kpi: (room) => steeringAngle(scene, room, 38),
					scrubRadius: (room) => groundSpan(scene, box, room, outward === 1 ? -1 : 1),
					rollCentreHeight: (room) => rollCentre(scene, room, outward),
					loadedRadius: (room) => loadedRadius(scene, room, outward),
					track: (room) => track(scene, box, room, outward)
				}
			: view === 'side'
				? {
						caster: (room) => steeringAngle(scene, room, 44),
						mechanicalTrail: (room) => groundSpan(scene, box, room, 1)
					}
				: view === 'top'
					? { toe: (room) => toe(scene, box, room) }
					: {};
	const placed: PlacedDimension[] = [];
	for (const key of Object.keys(makers) as DimensionKey[]) {
		const said = texts[key];
		const laid = said && makers[key]?.(roomFor(said));
		if (said && laid) placed.push({ key, ...said, ...laid });
	}
	return placed;
}

/** A small angle's figure over the middle of its arc rather than beyond its tails. */
function over(layout: DimensionLayout, [x, y]: Spot): DimensionLayout {
	return { ...layout, text: { x, y, anchor: 'middle' } };
}

function camber(scene: ViewScene, box: Box, room: number): Laid | null {
	const { contact, hub, wheelLine } = scene;
	if (!contact || !hub || wheelLine === null) return null;
	const radius = 2 * Math.hypot(hub[0] - contact[0], hub[1] - contact[1]) + 12;
	const layout = angularDimension({ centre: contact, radius, from: wheelLine, to: TO_UP, textWidth: room });
	const ray = (angle: number, from: number, to: number) =>
		[
			contact[0] + from * Math.cos(angle),
			contact[1] + from * Math.sin(angle),
			contact[0] + to * Math.cos(angle),
			contact[1] + to * Math.sin(angle)
		] as const;
	const above = contact[1] - radius - 13;
	// With no room over the tyre (the wheel is up in bump) the figure stands inside its outline.
	const text: Spot = [
		contact[0] + radius * Math.cos((wheelLine + TO_UP) / 2),
		above < box.y + 14 ? contact[1] - radius + 34 : above
	];
	return {
		layout: over(layout, text),
		reference: [ray(TO_UP, radius - 8, radius + 4), ray(wheelLine, radius - 8, radius + 4)]
	};
}

/** Kingpin inclination (front) or caster (side): between the plumb line through the axis's foot and the axis itself. */
function steeringAngle(scene: ViewScene, room: number, above: number): Laid | null {
	const { axis, axisFoot } = scene;
	if (!axis || !axisFoot) return null;
	const angle = Math.atan2(axis[3] - axis[1], axis[2] - axis[0]);
	const upper = Math.hypot(axis[2] - axis[0], axis[3] - axis[1]) - 26;
	const lay = (radius: number) =>
		angularDimension({ centre: axisFoot, radius, from: angle, to: TO_UP, textWidth: room, side: 'from' });
	// The figure keeps clear of marks: the arc is raised or lowered until it does.
	const clear = (layout: DimensionLayout) => {
		const { x, y, w, h } = textBox(layout, room);
		return scene.marks.every((mark) => mark.x < x - 9 || mark.x > x + w + 9 || mark.y < y - 6 || mark.y > y + h + 6);
	};
	const radii = [above, above + 14, above - 14, above + 28].map((more) => upper + more);
	const radius = radii.find((one) => clear(lay(one))) ?? upper + above;
	const end = radius + 5;
	const tip: Spot = [axisFoot[0] + end * Math.cos(angle), axisFoot[1] + end * Math.sin(angle)];
	return {
		layout: lay(radius),
		reference: [
			[axisFoot[0], axisFoot[1], axisFoot[0], axisFoot[1] - end],
			[axis[2], axis[3], tip[0], tip[1]]
		]
	};
}

/** Scrub radius (front) or trail (side): along the ground from the axis's foot to the contact point. */
function groundSpan(scene: ViewScene, box: Box, room: number, side: 1 | -1): Laid | null {
	const { contact, axisFoot, groundY } = scene;
	if (!contact || !axisFoot || groundY === null) return null;
	// Where the window ends close under the ground the dimension stands over it.
	const under = groundY + ROW_ONE <= box.y + box.h - EDGE / 2;
	const at = under ? groundY + ROW_ONE : groundY - ROW_ONE / 2;
	return {
		layout: linearDimension({ from: axisFoot, to: contact, run: 'level', at, textWidth: room, side }),
		reference: []
	};
}

function rollCentre(scene: ViewScene, room: number, outward: 1 | -1): Laid | null {
	const { rollCentre: centre, groundY } = scene;
	if (!centre || groundY === null) return null;
	const at = centre[0] + outward * (room / 2 + 12);
	const layout = linearDimension({
		from: [centre[0] + outward * 7, centre[1]],
		to: [at, groundY],
		run: 'upright',
		at,
		textWidth: room,
		side: -1
	});
	return { layout, reference: [] };
}

/** Hub to ground inside the tyre's outline, from the wheel's centre line to the ground line: neither needs extending. */
function loadedRadius(scene: ViewScene, room: number, outward: 1 | -1): Laid | null {
	const { hub, contact, groundY } = scene;
	if (!hub || !contact || groundY === null) return null;
	const at = contact[0] + outward * Math.max(6, room / 2 - 4);
	return {
		layout: linearDimension({ from: [at, hub[1]], to: [at, groundY], run: 'upright', at, textWidth: room }),
		reference: []
	};
}

/** The whole track on a half drawing: one arrow at the contact point, the line run past the centreline as usual for a symmetrical part. */
function track(scene: ViewScene, box: Box, room: number, outward: 1 | -1): Laid | null {
	const { contact, groundY, centreX } = scene;
	if (!contact || groundY === null || centreX === null) return null;
	const at = groundY + ROW_TWO;
	// In droop the ground comes down the page: the second row steps aside for the window's edge.
	if (at > box.y + box.h - EDGE) return null;
	const middle = (contact[0] + centreX) / 2;
	const past = centreX - outward * 18;
	const half = room / 2 + 4;
	const [near, far] = [middle - outward * half, middle + outward * half];
	return {
		layout: {
			extension: [[contact[0], groundY + 3, contact[0], at + 4]],
			line: [
				[past, at, near, at],
				[far, at, contact[0], at]
			],
			arcs: [],
			arrows: [{ x: contact[0], y: at, angle: outward === 1 ? 0 : Math.PI }],
			text: { x: middle, y: at, anchor: 'middle' },
			outside: false
		},
		reference: []
	};
}

/** Toe: the wheel plane against the fore-and-aft line, at the front of the tyre, or inside it where the window cuts it off. */
function toe(scene: ViewScene, box: Box, room: number): Laid | null {
	const { hub, contact, wheelLine, groundY } = scene;
	if (!hub || !contact || wheelLine === null || groundY !== null) return null;
	// The line is given toward the rear (up the page); the front of the car is down the page.
	const forward = wheelLine + Math.PI;
	const down = Math.PI / 2;
	const turned = Math.abs(Math.atan2(Math.sin(forward - down), Math.cos(forward - down)));
	const within = (scene.wheelRadius ?? 150) - 46;
	const radius = Math.max(36, Math.min(box.y + box.h - 62 - hub[1], within, 104));
	const layout = angularDimension({
		centre: hub,
		radius,
		from: down - signed(down - forward),
		to: down,
		textWidth: room
	});
	const ray = (angle: number) =>
		[hub[0], hub[1], hub[0] + (radius + 6) * Math.cos(angle), hub[1] + (radius + 6) * Math.sin(angle)] as const;
	if (turned > 0.6) return null;
	return { layout: over(layout, [hub[0], hub[1] + radius + 16]), reference: [ray(down), ray(forward)] };
}

const signed = (angle: number): number => Math.atan2(Math.sin(angle), Math.cos(angle));
