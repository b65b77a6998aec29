import { rmSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'vite';
import type * as Axle from '../src/lib/domain/axle';
import type * as Evaluation from '../src/lib/domain/evaluation';
import type * as Example from '../src/lib/domain/example';
import type * as Kernel from '../src/lib/kinematics';
import { generalSolver } from './lib/general-solver';

/** What a person's machine does per state and per page, as ratios measured in one run. Absolute times mean little. */
const ROUNDS = 9;
const root = path.resolve(import.meta.dirname, '..');
const folder = path.join(root, 'node_modules', '.cache', 'bench');

// Bundled as the browser gets it: a loader's getters around every import would be measured otherwise.
await build({
	configFile: false,
	root,
	logLevel: 'error',
	build: {
		outDir: folder,
		emptyOutDir: true,
		minify: false,
		lib: {
			entry: {
				kernel: path.join(root, 'src/lib/kinematics/index.ts'),
				evaluation: path.join(root, 'src/lib/domain/evaluation.ts'),
				example: path.join(root, 'src/lib/domain/example.ts'),
				axle: path.join(root, 'src/lib/domain/axle.ts')
			},
			formats: ['es']
		}
	}
});
const load = <T>(name: string): Promise<T> => import(pathToFileURL(path.join(folder, `${name}.js`)).href) as Promise<T>;
const { sweepBump, FIGURE_NAMES } = await load<typeof Kernel>('kernel');
const { evaluate } = await load<typeof Evaluation>('evaluation');
const { exampleAxle } = await load<typeof Example>('example');
const { axleGeometry } = await load<typeof Axle>('axle');
rmSync(folder, { recursive: true, force: true });

const document = exampleAxle();
const solved = axleGeometry(document);
if ('missing' in solved) throw new Error('The example corner is not complete.');
const geometry = solved.left;
const range = { from: -70, to: 70, step: 0.14 };
const states = 1001;

function allFigures(): number {
	let sum = 0;
	for (const state of sweepBump(geometry, range).states) for (const name of FIGURE_NAMES) sum += state[name] ?? 0;
	return sum;
}

function positionsOnly(): number {
	const solver = generalSolver(geometry);
	let steps = 0;
	for (let k = 0; k <= 500; k++) steps += solver.solve(k * 0.14);
	const back = generalSolver(geometry);
	for (let k = 1; k <= 500; k++) steps += back.solve(-k * 0.14);
	return steps;
}

const page = () => evaluate(geometry, document.targets, { from: -75, to: 75, step: 2.5 });

function microseconds(work: () => unknown): number {
	const from = performance.now();
	work();
	return (performance.now() - from) * 1000;
}

const median = (values: number[]) => values.sort((a, b) => a - b)[Math.floor(values.length / 2)] as number;
const runs: Record<'kernel' | 'general' | 'page', number[]> = { kernel: [], general: [], page: [] };
for (let warm = 0; warm < 5; warm++) [allFigures, positionsOnly, page].forEach((work) => work());
for (let round = 0; round < ROUNDS; round++) {
	runs.kernel.push(microseconds(allFigures) / states);
	runs.general.push(microseconds(positionsOnly) / states);
	runs.page.push(microseconds(page) / 1000);
}

function heapAfter(count: number): number {
	for (let done = 0; done < count; done += states) sweepBump(geometry, range);
	globalThis.gc?.();
	return process.memoryUsage().heapUsed;
}
heapAfter(50_000);
const grown = (heapAfter(800_000) - heapAfter(200_000)) / 2 ** 20;

const [kernel, general, pageTime] = [median(runs.kernel), median(runs.general), median(runs.page)];
const checks: [string, number, number, string][] = [
	['state with every figure, against a general solver giving positions only', kernel / general, 1, '×'],
	['a page worked out: ride height, curves, targets', pageTime, 4, 'ms'],
	['heap kept after 800,000 states, against after 200,000', Math.abs(grown), 1, 'MB']
];
console.log(
	`a state with every figure ${kernel.toFixed(2)} µs, general solver ${general.toFixed(2)} µs (medians of ${ROUNDS})`
);
for (const [what, value, limit, unit] of checks)
	console.log(`${value <= limit ? 'ok  ' : 'MISS'} ${what}: ${value.toFixed(3)} ${unit}, at most ${limit}`);
process.exitCode = checks.every(([, value, limit]) => value <= limit) ? 0 : 1;
