import { checkNode } from './lib/node-version.mjs';

checkNode();
const { supervise } = await import('./lib/supervise.mjs');
const { databaseCommand } = await import('./lib/database.mjs');
await supervise(() => databaseCommand(process.argv.slice(2)), { interrupted: 0 });
