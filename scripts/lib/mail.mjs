import { randomUUID } from 'node:crypto';
import { createWriteStream, renameSync, rmSync } from 'node:fs';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import { openFolder } from './env.mjs';
import { freePort } from './ports.mjs';

const PREFERRED_PORT = 2525;

/**
 * Catches every mail: each becomes a file in the data folder's mail/, named so that the newest comes last.
 * @param {import('./processes.mjs').Processes} processes
 * @param {string} folder the data folder
 * @returns {Promise<Record<string, string>>} the SMTP_* variables that lead to it
 */
export async function startMail(processes, folder) {
	// Loaded late: the commands start before the packages are installed.
	const { SMTPServer } = await import('smtp-server');
	const mails = openFolder(path.join(folder, 'mail'));
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['STARTTLS', 'AUTH'],
		onData(stream, _session, callback) {
			save(stream, mails).then(() => callback(), callback);
		}
	});
	server.on('error', (error) => console.error(`The mail catcher: ${error.message}`));
	const port = await freePort(PREFERRED_PORT);
	await new Promise((resolve) => server.listen(port, '127.0.0.1', () => resolve(undefined)));
	processes.atEnd(() => new Promise((resolve) => server.close(() => resolve(undefined))));
	return { SMTP_URL: `smtp://127.0.0.1:${port}` };
}

/** A mail appears under its name only when it is whole. @param {NodeJS.ReadableStream} stream @param {string} mails */
async function save(stream, mails) {
	const name = `${new Date().toISOString().replaceAll(':', '-')}-${randomUUID().slice(0, 8)}`;
	const arriving = path.join(mails, `${name}.part`);
	try {
		await pipeline(stream, createWriteStream(arriving, { mode: 0o600 }));
	} catch (error) {
		rmSync(arriving, { force: true });
		throw error;
	}
	renameSync(arriving, path.join(mails, `${name}.eml`));
}
