import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { hashPassword } from '$lib/server/auth/passwords';
import { signIn } from '$lib/server/auth/sign-in';
import { actorOfToken, issueToken } from '$lib/server/auth/tokens';
import { newId } from '$lib/server/db/id';

const PASSWORD = 'a-leaf-between-two-pages';
const ADDRESS = '192.0.2.10';
const NOON = new Date('2026-06-01T12:00:00Z');
const later = (seconds: number) => new Date(NOON.getTime() + seconds * 1000);
let owner: pg.Client;

async function somebody(name: string): Promise<string> {
	const email = `${name}@laboratory.example`;
	const id = newId();
	await owner.query('insert into person (id, email, name, password_hash) values ($1, $2, $3, $4)', [
		id,
		email,
		name,
		await hashPassword(PASSWORD)
	]);
	await owner.query(`insert into membership (person_id, role) values ($1, 'formulator')`, [id]);
	return email;
}
const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
});
afterAll(() => owner.end());

describe('signing in', () => {
	test('keeps only a hash of the session, never what the cookie holds', async () => {
		const email = await somebody('keeper');
		const { value } = await signIn({ email, password: PASSWORD }, ADDRESS, NOON);
		const { rows } = await owner.query('select * from session');
		expect(rows.length).toBeGreaterThan(0);
		expect(JSON.stringify(rows)).not.toContain(value);
	});

	test('says the same of a wrong password and of an unknown e-mail', async () => {
		const email = await somebody('known');
		for (const each of [email, 'nobody@laboratory.example'])
			await expect(signIn({ email: each, password: 'wrong' }, ADDRESS, NOON)).rejects.toThrow(
				refusal('wrong-credentials')
			);
	});

	test('is closed after eight failures, even to the right password, until the quarter of an hour is over', async () => {
		const email = await somebody('guessed');
		for (let failure = 1; failure <= 8; failure += 1)
			await expect(signIn({ email, password: 'wrong' }, ADDRESS, NOON)).rejects.toThrow(refusal('wrong-credentials'));
		await expect(signIn({ email, password: PASSWORD }, ADDRESS, NOON)).rejects.toThrow(
			refusal('too-many-attempts', { retryAfter: 900 })
		);
		await expect(signIn({ email, password: PASSWORD }, ADDRESS, later(900))).resolves.toBeDefined();
	});

	test('is refused to a person who was disabled', async () => {
		const email = await somebody('former');
		await owner.query('update person set disabled_at = now() where email = $1', [email]);
		await expect(signIn({ email, password: PASSWORD }, ADDRESS, NOON)).rejects.toThrow(refusal('wrong-credentials'));
	});
});

describe('a token for the compute endpoints', () => {
	test('stands for its person until it expires', async () => {
		const email = await somebody('caller');
		const { token, expiresAt } = await issueToken({ email, password: PASSWORD }, ADDRESS, NOON);
		expect((await actorOfToken(token, later(60)))?.email).toBe(email);
		expect(await actorOfToken(token, new Date(expiresAt))).toBeNull();
		expect(await actorOfToken(`${token}x`, later(60))).toBeNull();
	});

	test('is issued ten times a minute to one person, not eleven times', async () => {
		const email = await somebody('eager');
		const once = () => issueToken({ email, password: PASSWORD }, ADDRESS, later(7200));
		for (let count = 1; count <= 10; count += 1) await once();
		await expect(once()).rejects.toThrow(refusal('too-many-attempts', { retryAfter: 60, limit: 10 }));
	});

	test('makes 600 calls a minute, and the next one waits', async () => {
		const email = await somebody('busy');
		const { token } = await issueToken({ email, password: PASSWORD }, ADDRESS, NOON);
		await Promise.all(Array.from({ length: 600 }, () => actorOfToken(token, later(120))));
		await expect(actorOfToken(token, later(125))).rejects.toThrow(
			refusal('too-many-attempts', { retryAfter: 55, limit: 600 })
		);
		expect(await actorOfToken(token, later(180))).not.toBeNull();
	});
});
