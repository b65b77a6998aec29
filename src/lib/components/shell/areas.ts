/** An area of a build as the rail names it. `path` follows the build's own address. */
export interface Area {
	key: string;
	label: string;
	path: string;
	/** Which of the page data's acts opens it. */
	act: 'build.read' | 'draft.read' | 'revision.read' | 'record.add';
}

/** The areas that work, in the order of the job. Digits stand in the order of the list. */
export const AREAS: readonly Area[] = [
	{ key: '1', label: 'Job card', path: '', act: 'build.read' },
	{ key: '2', label: 'Points', path: '/points', act: 'revision.read' },
	{ key: '3', label: 'Travel', path: '/travel', act: 'revision.read' },
	{ key: '4', label: 'Compare', path: '/compare', act: 'revision.read' },
	{ key: '5', label: 'Alignment', path: '/alignment', act: 'revision.read' }
];

/** The area a pathname lies in, from the part that follows the build's address. */
export function areaAt(rest: string): Area | undefined {
	return AREAS.find((area) => (area.path === '' ? rest === '' || rest === '/' : rest.startsWith(area.path)));
}
