import { checkNode } from './lib/node-version.mjs';

checkNode();
const { supervise } = await import('./lib/supervise.mjs');
const { start } = await import('./lib/start.mjs');
// Stopped by its user is how this command ends well.
await supervise(() => start({ dev: process.argv.includes('--dev') }), { interrupted: 0 });
