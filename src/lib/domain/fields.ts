import type { Quantity } from '../units';

export interface Field {
	readonly label: string;
	/** Null for words and plain counts. */
	readonly quantity: Quantity | null;
}

const field = (label: string, quantity: Quantity | null = null): Field => ({ label, quantity });

const CORNER: Readonly<Record<string, Field>> = {
	'wheel.track': field('Track', 'length'),
	'wheel.x': field('Wheel, fore', 'length'),
	'wheel.loadedRadius': field('Loaded radius', 'length'),
	'wheel.camber': field('Static camber', 'angle'),
	'wheel.toe': field('Static toe per wheel', 'angle'),
	coilover: field('Coil-over'),
	'coilover.on': field('Coil-over stands on'),
	'coilover.rate': field('Spring rate', 'rate'),
	'coilover.forceAtRide': field('Spring force at ride height', 'force'),
	'coilover.openLength': field('Coil-over, open length', 'length'),
	'coilover.closedLength': field('Coil-over, closed length', 'length')
};

const REST: Readonly<Record<string, Field>> = {
	right: field('Right side'),
	'vehicle.wheelbase': field('Wheelbase', 'length'),
	'vehicle.cgHeight': field('Height of the centre of gravity', 'length'),
	'vehicle.frontBrakeShare': field('Front brake share', 'ratio'),
	'vehicle.frontBrakes': field('Front brakes'),
	'vehicle.sprungCornerMass': field('Sprung corner mass', 'mass'),
	'vehicle.tyreRate': field('Tyre rate', 'rate'),
	'adjusters.upper.kind': field('Upper arm adjusted by'),
	'adjusters.upper.side': field('A shim moves the pivot'),
	'adjusters.upper.direction.0': field('Shim direction, fore', 'ratio'),
	'adjusters.upper.direction.1': field('Shim direction, out', 'ratio'),
	'adjusters.upper.direction.2': field('Shim direction, up', 'ratio'),
	'adjusters.upper.frontNow': field('Front pack now', 'length'),
	'adjusters.upper.rearNow': field('Rear pack now', 'length'),
	'adjusters.upper.boltReserve': field('Thread left past the nut', 'length'),
	'adjusters.upper.maxPack': field('Thickest pack', 'length'),
	'adjusters.upper.maxDifference': field('Largest difference front to rear', 'length'),
	'adjusters.upper.thread': field('Rod end thread'),
	'adjusters.upper.fitting': field('Rod end fitting'),
	'adjusters.upper.handedness': field('Rod end thread hand'),
	'adjusters.upper.engagementNow': field('Thread engaged now', 'length'),
	'adjusters.upper.minEngagement': field('Least thread engaged', 'length'),
	'adjusters.tieRod.thread': field('Tie-rod thread'),
	'adjusters.tieRod.fitting': field('Tie-rod fitting'),
	'adjusters.tieRod.flats': field('Tie-rod flats')
};

/** The name and quantity of a field of the axle document by its path (`left.wheel.track`), or null where it has no name of its own. */
export function fieldOf(path: string): Field | null {
	const rest = REST[path];
	if (rest) return rest;
	const align = /^alignment\.(left|right)\.(camber|caster|toe)(?:\.(value|tolerance))?$/.exec(path);
	if (align) {
		const [, side, angle, part] = align;
		const name = `Wanted ${angle === 'toe' ? 'toe per wheel' : angle}, ${side}${part === 'tolerance' ? ', tolerance' : ''}`;
		return part === undefined ? null : field(name, 'angle');
	}
	const corner = /^(left|right)\.(.+)$/.exec(path);
	const known = corner && CORNER[corner[2] ?? ''];
	if (!known) return null;
	return corner[1] === 'right'
		? { ...known, label: `Right side, ${known.label[0]?.toLowerCase()}${known.label.slice(1)}` }
		: known;
}
