import { checkNode } from './lib/node-version.mjs';

checkNode();
const { supervise } = await import('./lib/supervise.mjs');
const { test } = await import('./lib/test.mjs');
await supervise((context) => test(process.argv.slice(2), context));
