import { readFileSync } from 'fs';

/**
 * Refuses a Node that cannot run the project. Kept to what old versions understand; everything else is
 * imported after it has passed.
 */
export function checkNode(current = process.versions.node) {
	const manifest = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8'));
	if (satisfies(current, manifest.engines.node)) return;
	process.stderr.write(
		`\nNode ${manifest.engines.node} is needed; this is Node ${current}. Install Node 20 (see .nvmrc) and try again.\n`
	);
	process.exit(1);
}

/** Whether a version lies in a range made of ">=a.b", "<c" and "||" (all that package.json uses). */
export function satisfies(version, range) {
	const parts = (text) => text.split('.').map(Number);
	const compare = (a, b) => {
		for (let i = 0; i < 3; i++) {
			const difference = (a[i] || 0) - (b[i] || 0);
			if (difference !== 0) return difference;
		}
		return 0;
	};
	return range.split('||').some((group) =>
		group
			.trim()
			.split(/\s+/)
			.every((bound) => {
				const match = /^(>=|<)(\d[\d.]*)$/.exec(bound);
				if (!match) throw new Error(`package.json: engines.node "${range}" is not understood at "${bound}"`);
				const difference = compare(parts(version), parts(match[2]));
				return match[1] === '>=' ? difference >= 0 : difference < 0;
			})
	);
}
