import { rmSync } from 'node:fs';
import { createInterface } from 'node:readline/promises';
import { parseArgs } from 'node:util';
import { checkNode, dataFolder, say, Stop } from './lib/env.mjs';
import { lockHolder } from './lib/lock.mjs';
import { runCommand } from './lib/processes.mjs';

const { values: options } = parseArgs({
	options: { data: { type: 'string' }, yes: { type: 'boolean', default: false } }
});

/** What the commands put into a data folder; anything else in it is not ours to remove. */
const OURS = [
	'pg',
	'pg-made',
	'pg-password',
	'bucket',
	'mail',
	'logs',
	'secrets.json',
	'demo-accounts.json',
	'workspace-begun',
	'workspace-filled',
	'start.lock'
];

await runCommand(async () => {
	checkNode();
	const folder = dataFolder(options.data);
	const holder = lockHolder(folder, 'start.lock');
	if (holder) throw new Stop(`Costmary runs from this folder (process ${holder.pid}); end it first.`);
	if (!options.yes && !(await agreed(folder))) {
		say('Nothing was removed.');
		return;
	}
	for (const name of OURS) rmSync(`${folder}/${name}`, { recursive: true, force: true });
	say('Removed. The next start begins anew.');
});

/** @param {string} folder */
async function agreed(folder) {
	if (!process.stdin.isTTY) throw new Stop('Nobody can be asked here; say --yes to remove the data.');
	const asking = createInterface({ input: process.stdin, output: process.stdout });
	const answer = await asking.question(`Remove the database, the files and the mails in ${folder}? Type yes: `);
	asking.close();
	return answer.trim().toLowerCase() === 'yes';
}
