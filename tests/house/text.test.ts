import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync, statSync } from 'node:fs';
import path from 'node:path';
import { expect, test } from 'vitest';

const ROOT = path.resolve(import.meta.dirname, '../..');
const LARGEST_TEXT = 2_000_000;
const NOT_OURS = /^(package-lock\.json|templates\/fonts\/)/;

// Spelt in pieces, so that this file does not hold what it looks for.
const word = (...parts: string[]) => parts.join('');
const BANNED: readonly { what: string; pattern: RegExp }[] = [
	{ what: 'a path of one machine', pattern: new RegExp(`(^|[^.\\w])/(${word('wo', 'rk')}|${word('ro', 'ot')})/`) },
	{
		what: 'a path of a home folder',
		pattern: new RegExp(`(^|[^.\\w])/(${word('ho', 'me')}|${word('Us', 'ers')})/\\w+/`)
	},
	{ what: 'a registry host', pattern: new RegExp(`${word('regis', 'try')}\\.[a-z]+\\.org|deb\\.[a-z]+\\.org`) },
	{
		what: 'a word of how the work was done',
		pattern: new RegExp(word('trans', 'cript') + '|' + word('seed ', 'document'), 'i')
	},
	{
		what: 'work left for later',
		pattern: new RegExp(`\\b(${word('TO', 'DO')}|${word('FIX', 'ME')}|${word('XX', 'X')}|${word('HA', 'CK')})\\b`)
	},
	{
		what: 'a rule switched off',
		pattern: new RegExp(`${word('eslint-', 'disable')}|${word('@ts-', 'ignore')}|${word('@ts-', 'nocheck')}`)
	},
	{
		what: 'a test that is skipped or alone',
		pattern: new RegExp(
			`\\b(it|test|describe)\\.(${word('sk', 'ip')}|${word('on', 'ly')}|${word('to', 'do')}|${word('fix', 'me')})\\(`
		)
	},
	{ what: 'a test that sleeps', pattern: new RegExp(word('waitFor', 'Timeout') + '\\(') }
];

/** Files under version control and those about to be: the list leaves out whatever is ignored. */
function ourFiles(): string[] {
	const listed = execFileSync('git', ['ls-files', '-z', '--cached', '--others', '--exclude-standard'], {
		cwd: ROOT,
		encoding: 'utf8'
	});
	return listed.split('\0').filter((file) => file && !NOT_OURS.test(file) && existsSync(path.join(ROOT, file)));
}

function textOf(file: string): string | null {
	const full = path.join(ROOT, file);
	if (!statSync(full).isFile() || statSync(full).size > LARGEST_TEXT) return null;
	const text = readFileSync(full, 'utf8');
	return text.includes('\0') ? null : text;
}

function banned(): string[] {
	return ourFiles().flatMap((file) => {
		const lines = textOf(file)?.split('\n') ?? [];
		return lines.flatMap((line, index) =>
			BANNED.filter(({ pattern }) => pattern.test(line)).map(({ what }) => `${file}:${index + 1}: ${what}`)
		);
	});
}

test('no file holds a machine path, a registry host, a switched-off rule or work left for later', () => {
	expect(banned()).toEqual([]);
});
