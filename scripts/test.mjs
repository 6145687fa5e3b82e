import { parseArgs } from 'node:util';
import path from 'node:path';
import { ensureBuilt } from './lib/build.mjs';
import { checkNode, ROOT, say, Stop } from './lib/env.mjs';
import { ensureDebianPackages, ensureNodeModules, TO_TEST } from './lib/install.mjs';
import { runCommand } from './lib/processes.mjs';
import { oneTally, playwrightTally, vitestTally } from './lib/tally.mjs';
import { fillWorkspaces, startTestServices, testFolder } from './lib/test-services.mjs';

/** The whole run must end within 25 minutes; a step that would not is ended and counts as failed. */
const DEADLINE = Date.now() + 24 * 60_000;
const STEPS = /** @type {const} */ (['lint', 'check', 'unit', 'integration', 'e2e']);
const NEEDS_SERVICES = new Set(['integration', 'e2e']);

/** @typedef {(typeof STEPS)[number]} Step */
/** @typedef {import('./lib/tally.mjs').Tally} Tally */

const { values: options, positionals } = parseArgs({
	options: { only: { type: 'string', multiple: true, default: [] } },
	allowPositionals: true
});

await runCommand(async (processes) => {
	checkNode();
	const steps = chosenSteps();
	await ensureNodeModules(processes);
	await ensureDebianPackages(processes, TO_TEST);
	// The editor's configuration is generated; without it neither the type check nor the tests resolve their paths.
	await runNode(processes, 'svelte-kit sync', ['node_modules/@sveltejs/kit/svelte-kit.js', 'sync']);
	const folder = testFolder(processes);
	const { variables, fault } = await prepare(processes, steps, folder);

	/** @type {[string, Tally][]} */
	const tallies = fault ? [['Preparing', oneTally(1)]] : [];
	for (const step of steps) {
		say(`\n── ${step} ${'─'.repeat(70 - step.length)}`);
		const possible = !fault || !NEEDS_SERVICES.has(step);
		if (!possible) say('Not run, as preparing failed.');
		tallies.push([step, possible ? await runStep(processes, step, folder, variables) : oneTally(1)]);
	}
	return report(processes, tallies);
});

/** @returns {Step[]} */
function chosenSteps() {
	const unknown = options.only.filter((each) => !STEPS.some((step) => step === each));
	if (unknown.length > 0) throw new Stop(`--only takes ${STEPS.join(', ')}; not ${unknown.join(', ')}.`);
	return STEPS.filter((step) => options.only.length === 0 || options.only.includes(step));
}

/**
 * Builds, and starts what the steps need. A fault here is told and counted; the steps that need nothing still run.
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {Step[]} steps
 * @param {string} folder
 * @returns {Promise<{ variables: NodeJS.ProcessEnv, fault: boolean }>}
 */
async function prepare(processes, steps, folder) {
	if (!steps.some((step) => NEEDS_SERVICES.has(step))) return { variables: {}, fault: false };
	const e2e = steps.includes('e2e');
	try {
		await ensureBuilt(processes, e2e ? ['web', 'worker'] : ['worker']);
		say('Starting the database, the bucket and the mail catcher …');
		const started = await startTestServices(processes, folder);
		if (e2e) say('Filling the workspaces of the end-to-end tests …');
		const workspaces = e2e ? await fillWorkspaces(processes, started, folder) : {};
		return { variables: { ...started.variables, ...workspaces }, fault: false };
	} catch (error) {
		if (processes.ending) throw error;
		console.error(error instanceof Stop ? error.message : error);
		return { variables: {}, fault: true };
	}
}

/**
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {Step} step
 * @param {string} folder
 * @param {NodeJS.ProcessEnv} variables
 * @returns {Promise<Tally>}
 */
async function runStep(processes, step, folder, variables) {
	const json = path.join(folder, `${step}.json`);
	const vitest = (/** @type {string[]} */ projects) => [
		'node_modules/vitest/vitest.mjs',
		'run',
		...projects.flatMap((project) => ['--project', project]),
		'--reporter=default',
		'--reporter=json',
		`--outputFile.json=${json}`,
		...positionals
	];
	switch (step) {
		case 'lint': {
			const rules = await runNode(processes, 'ESLint', [
				'node_modules/eslint/bin/eslint.js',
				'--max-warnings',
				'0',
				'.'
			]);
			const shape = await runNode(processes, 'Prettier', ['node_modules/prettier/bin/prettier.cjs', '--check', '.']);
			return sum([oneTally(rules), oneTally(shape)]);
		}
		case 'check': {
			const args = ['node_modules/svelte-check/bin/svelte-check', '--fail-on-warnings'];
			return oneTally(await runNode(processes, 'svelte-check', args));
		}
		case 'unit':
			return vitestTally(json, await runNode(processes, 'Vitest', vitest(['domain', 'ui'])));
		case 'integration':
			return vitestTally(json, await runNode(processes, 'Vitest', vitest(['integration']), variables));
		case 'e2e': {
			const args = ['node_modules/@playwright/test/cli.js', 'test', '--reporter=list,json', ...positionals];
			const report = { PLAYWRIGHT_JSON_OUTPUT_NAME: json };
			return playwrightTally(json, await runNode(processes, 'Playwright', args, { ...variables, ...report }));
		}
	}
}

/**
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {string} name
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} [variables]
 */
async function runNode(processes, name, args, variables = {}) {
	const order = { name, command: process.execPath, args, cwd: ROOT, env: { ...cleanEnvironment(), ...variables } };
	let late = false;
	const timer = setTimeout(
		() => {
			late = true;
			void processes.endNewest();
		},
		Math.max(0, DEADLINE - Date.now())
	);
	const code = await processes.run(order);
	clearTimeout(timer);
	if (late) say(`${name} was ended: the time for all tests is over.`);
	return code;
}

/** Tests never touch real services, even when the shell names some. */
function cleanEnvironment() {
	const ours = /^(DATABASE_|S3_|SMTP_|COSTMARY_|ORIGIN$|PORT$|HOST$)/;
	return Object.fromEntries(Object.entries(process.env).filter(([name]) => !ours.test(name)));
}

/** @param {Tally[]} tallies @returns {Tally} */
function sum(tallies) {
	return tallies.reduce((all, each) => ({ passed: all.passed + each.passed, failed: all.failed + each.failed }), {
		passed: 0,
		failed: 0
	});
}

/** @param {import('./lib/processes.mjs').Processes} processes @param {[string, Tally][]} tallies */
function report(processes, tallies) {
	const total = sum(tallies.map(([, tally]) => tally));
	say('');
	for (const [step, { passed, failed }] of tallies) say(`${step.padEnd(12)} ${passed} passed, ${failed} failed`);
	// Said last of all, when everything is cleaned up: whoever reads only the last line reads the result.
	processes.atVeryEnd(() => say(`${total.passed} passed, ${total.failed} failed`));
	return total.failed > 0 ? 1 : 0;
}
