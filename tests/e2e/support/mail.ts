import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { expect } from '@playwright/test';
import { testVariable } from '../../integration/support/database';

/** Quoted-printable: soft line ends fall away, and "=3D" is "=". */
const decoded = (text: string) =>
	text
		.replace(/=\r?\n/g, '')
		.replace(/=([0-9A-F]{2})/g, (_all, code: string) => String.fromCharCode(parseInt(code, 16)));

function caught(to: string): string | undefined {
	const folder = path.join(testVariable('COSTMARY_TEST_FOLDER'), 'mail');
	return readdirSync(folder)
		.filter((name) => name.endsWith('.eml'))
		.sort()
		.reverse()
		.map((name) => decoded(readFileSync(path.join(folder, name), 'utf8')))
		.find((mail) => mail.includes(to));
}

/** The link in the newest mail to somebody, once the worker has sent it. */
export async function linkMailedTo(to: string): Promise<string> {
	await expect.poll(() => caught(to), { timeout: 30_000, message: `a mail to ${to}` }).toBeDefined();
	return /https?:\/\/\S+/.exec(caught(to) ?? '')?.[0] ?? '';
}
