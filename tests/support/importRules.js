/**
 * Who may import whom inside src/, once for the linter and for the test that reads every import.
 * A layer may always import itself. `packages` lists the npm packages a pure layer may use; null means any.
 * @type {Record<string, { folder: string, layers: string[], packages: string[] | null }>}
 */
export const IMPORT_RULES = {
	kinematics: { folder: 'src/lib/kinematics', layers: [], packages: ['gl-matrix'] },
	schemas: { folder: 'src/lib/schemas', layers: ['kinematics'], packages: ['zod'] },
	domain: {
		folder: 'src/lib/domain',
		layers: ['kinematics', 'schemas', 'text'],
		packages: ['zod', 'json-canonicalize', 'fraction.js', 'papaparse', 'mutative']
	},
	text: { folder: 'src/lib', layers: ['schemas', 'kinematics', 'domain'], packages: ['fraction.js'] },
	charts: { folder: 'src/lib/charts', layers: ['kinematics', 'domain', 'schemas', 'text'], packages: ['d3', 'svelte'] },
	drawing: {
		folder: 'src/lib/drawing',
		layers: ['kinematics', 'domain', 'schemas', 'text', 'charts'],
		packages: ['d3', 'svelte', 'gl-matrix']
	},
	client: { folder: 'src/lib/client', layers: ['schemas', 'domain', 'kinematics', 'text'], packages: null },
	state: { folder: 'src/lib/state', layers: ['client', 'domain', 'kinematics', 'schemas', 'text'], packages: null },
	components: {
		folder: 'src/lib/components',
		layers: ['client', 'state', 'domain', 'kinematics', 'schemas', 'text', 'charts', 'drawing'],
		packages: null
	},
	server: { folder: 'src/lib/server', layers: ['domain', 'kinematics', 'schemas', 'text'], packages: null }
};

export const LAYERS = Object.keys(IMPORT_RULES);

/** The layer a `$lib/…` path belongs to; a file straight in src/lib is text (units, format, parse). */
export function layerOf(libPath) {
	const first = libPath.split('/')[0] ?? '';
	return LAYERS.includes(first) ? first : 'text';
}
