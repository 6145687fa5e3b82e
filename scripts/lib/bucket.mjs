import { createInterface } from 'node:readline';
import path from 'node:path';
import { ROOT, secretsOf, Stop, openFolder } from './env.mjs';
import { freePort } from './ports.mjs';

const PREFERRED_PORT = 9310;
const BUCKET = 'costmary';
const REGION = 'us-east-1';
const READY_MS = 20_000;

/**
 * Starts the stand-in for the bucket on the loopback address.
 * @param {import('./processes.mjs').Processes} processes
 * @param {string} folder the data folder
 * @param {{ controls?: boolean }} [options] controls: the calls by which a test makes it fail
 * @returns {Promise<Record<string, string>>} the S3_* variables that lead to it
 */
export async function startBucket(processes, folder, { controls = false } = {}) {
	const { bucketKey, bucketSecret } = secretsOf(folder);
	const data = openFolder(path.join(folder, 'bucket'));
	const keys = { S3_ACCESS_KEY_ID: bucketKey, S3_SECRET_ACCESS_KEY: bucketSecret };
	const port = await freePort(PREFERRED_PORT);
	const child = processes.start({
		name: 'The bucket stand-in',
		command: process.execPath,
		args: [
			'--import',
			'tsx',
			'minio-fake/main.ts',
			...['--port', String(port), '--data', data, '--bucket', BUCKET, '--region', REGION],
			...(controls ? ['--controls'] : [])
		],
		cwd: ROOT,
		env: { ...process.env, ...keys },
		stdio: ['ignore', 'pipe', 'inherit']
	});
	const ready = await firstLine(child);
	return {
		...keys,
		S3_ENDPOINT: `http://127.0.0.1:${ready.port}`,
		S3_REGION: REGION,
		S3_BUCKET: BUCKET,
		S3_FORCE_PATH_STYLE: 'true'
	};
}

/**
 * @param {import('node:child_process').ChildProcess} child
 * @returns {Promise<{ port: number }>}
 */
function firstLine(child) {
	return new Promise((resolve, reject) => {
		const fail = () => reject(new Stop('The bucket stand-in did not start; what it printed above says why.'));
		const timer = setTimeout(fail, READY_MS);
		child.once('error', fail);
		child.once('exit', fail);
		if (!child.stdout) return fail();
		createInterface({ input: child.stdout }).once('line', (line) => {
			clearTimeout(timer);
			child.off('exit', fail);
			resolve(JSON.parse(line));
		});
	});
}
