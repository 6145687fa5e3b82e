import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { changePassword, requestReset, setPassword, signOutEverywhere } from '$lib/server/auth/account';
import { readLink } from '$lib/server/auth/links';
import { loadActor } from '$lib/server/auth/load-actor';
import { validateSession } from '$lib/server/auth/sessions';
import { signIn } from '$lib/server/auth/sign-in';
import type { Actor } from '$lib/server/access/actor';
import { deliverMail, sweepMails } from '$lib/server/mail/outbox';
import { addPerson, mailLink } from '$lib/server/services/people';
import { personSchema } from '$lib/schemas/person';
import { insertPerson } from './support/people';

let owner: pg.Client;
let administrator: Actor;
const ADDRESS = '192.0.2.20';
const NOW = new Date('2026-06-01T12:00:00Z');
const FIRST = 'the first long password';
const SECOND = 'the second long password';

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	administrator = await insertPerson(owner, 'administrator', 'administrator');
});
afterAll(() => owner.end());

const invite = (name: string) =>
	addPerson(
		administrator,
		personSchema.parse({ name, email: `${name}@laboratory.example`, password: '', roles: ['formulator'], clientId: '' })
	);
/** The newest mail to an address, as it waits in the outbox. */
async function mailTo(email: string) {
	const { rows } = await owner.query(
		'select id, template, data, state, message_id from outbox_mail where to_address = $1 order by id desc limit 1',
		[email]
	);
	const link: string = rows[0]?.data.link ?? '';
	return { ...rows[0], secret: link.split('/').at(-1) ?? '' };
}
const refusal = (code: string) => expect.objectContaining({ code });
const signedIn = async (email: string, password: string) => {
	const { value } = await signIn({ email, password }, ADDRESS, NOW);
	return value;
};

describe('an invitation', () => {
	test('is mailed with a link that sets the first password once', async () => {
		await invite('alder');
		const { secret, template } = await mailTo('alder@laboratory.example');
		expect(template).toBe('invitation');
		expect(await readLink(secret, 'invitation', new Date())).toMatchObject({ name: 'alder' });
		expect(await readLink(secret, 'reset', new Date())).toBeNull();
		await setPassword('invitation', secret, FIRST, new Date());
		await expect(setPassword('invitation', secret, SECOND, new Date())).rejects.toThrow(refusal('not-found'));
		expect(await signedIn('alder@laboratory.example', FIRST)).toBeTruthy();
	});

	test('sent again ends the link before it', async () => {
		const id = await invite('beech');
		const first = await mailTo('beech@laboratory.example');
		await mailLink(administrator, id);
		expect(await readLink(first.secret, 'invitation', new Date())).toBeNull();
		const second = await mailTo('beech@laboratory.example');
		expect(await readLink(second.secret, 'invitation', new Date())).not.toBeNull();
	});

	test('is not what somebody gets who has an account already', async () => {
		const id = await invite('birch');
		await setPassword('invitation', (await mailTo('birch@laboratory.example')).secret, FIRST, new Date());
		await mailLink(administrator, id);
		expect((await mailTo('birch@laboratory.example')).template).toBe('reset');
	});

	test('is over after a week', async () => {
		await invite('cedar');
		const { secret } = await mailTo('cedar@laboratory.example');
		const later = new Date(Date.now() + 8 * 24 * 60 * 60 * 1000);
		expect(await readLink(secret, 'invitation', later)).toBeNull();
	});

	test('keeps no secret: neither the link’s nor, once sent, the mail’s', async () => {
		await invite('dogwood');
		const mail = await mailTo('dogwood@laboratory.example');
		const { rows } = await owner.query('select * from one_time_link');
		expect(JSON.stringify(rows)).not.toContain(mail.secret);
		await deliverMail(mail.id);
		expect(await mailTo('dogwood@laboratory.example')).toMatchObject({ state: 'sent', data: {} });
		// Sent again by a queue that lost count: nothing happens.
		await deliverMail(mail.id);
	});
});

describe('a new password', () => {
	test('by mail ends every sign-in and tells the person', async () => {
		await invite('elm');
		const email = 'elm@laboratory.example';
		await setPassword('invitation', (await mailTo(email)).secret, FIRST, new Date());
		const session = await signedIn(email, FIRST);
		await requestReset(email, ADDRESS, NOW);
		await setPassword('reset', (await mailTo(email)).secret, SECOND, NOW);
		expect(await validateSession(session)).toBeNull();
		expect((await mailTo(email)).template).toBe('passwordChanged');
		await expect(signedIn(email, FIRST)).rejects.toThrow(refusal('wrong-credentials'));
		expect(await signedIn(email, SECOND)).toBeTruthy();
	});

	test('is promised to an unknown e-mail too, and no mail is written', async () => {
		await requestReset('nobody@laboratory.example', ADDRESS, NOW);
		expect((await mailTo('nobody@laboratory.example')).template).toBeUndefined();
	});

	test('is asked for three times an hour', async () => {
		const ask = () => requestReset('eager@laboratory.example', ADDRESS, NOW);
		for (let count = 1; count <= 3; count += 1) await ask();
		await expect(ask()).rejects.toThrow(refusal('too-many-attempts'));
	});

	test('cannot be guessed at from an open sign-in', async () => {
		await invite('gorse');
		const email = 'gorse@laboratory.example';
		await setPassword('invitation', (await mailTo(email)).secret, FIRST, new Date());
		const session = await validateSession(await signedIn(email, FIRST));
		const actor = await loadActor(session?.personId ?? '');
		if (!actor) throw new Error('somebody who signed in is there');
		for (let guess = 1; guess <= 8; guess += 1)
			await expect(changePassword(actor, 'a guess', SECOND, NOW)).rejects.toThrow(refusal('wrong-credentials'));
		await expect(changePassword(actor, FIRST, SECOND, NOW)).rejects.toThrow(refusal('too-many-attempts'));
	});

	test('a mail that the queue lost is sent by the sweep', async () => {
		await invite('hazel');
		await sweepMails(new Date(Date.now() + 2 * 60 * 60 * 1000));
		expect((await mailTo('hazel@laboratory.example')).state).toBe('sent');
	});

	test('by hand needs the present one, and leaves only the sign-in that changed it', async () => {
		await invite('fir');
		const email = 'fir@laboratory.example';
		await setPassword('invitation', (await mailTo(email)).secret, FIRST, new Date());
		const other = await signedIn(email, FIRST);
		const session = await validateSession(other);
		const actor = await loadActor(session?.personId ?? '');
		if (!actor) throw new Error('somebody who signed in is there');
		await expect(changePassword(actor, SECOND, SECOND, NOW)).rejects.toThrow(refusal('wrong-credentials'));
		const { value } = await changePassword(actor, FIRST, SECOND, NOW);
		expect(await validateSession(other)).toBeNull();
		expect(await validateSession(value)).not.toBeNull();
		await signOutEverywhere(actor);
		expect(await validateSession(value)).toBeNull();
	});
});
