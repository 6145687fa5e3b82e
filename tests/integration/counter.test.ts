import { join } from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';
import {
	approveAsClient,
	approveForLaboratory,
	createCopy,
	putCopyInUse,
	saveCopy,
	sendBackCopy,
	submitCopy
} from '$lib/server/services/copies';
import { downloadCopy } from '$lib/server/services/copy-print';
import { readCounter, readCounterProduct, sharedIssueAddress } from '$lib/server/services/counter';
import { filledDraft, Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
let officer: Actor;
let client: Actor;
let stranger: Actor;

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	({ officer } = shop);
	client = await shop.client('Pell and Fennick');
	stranger = await shop.client('Harrow Quay');
	await shop.material('WATER', [{ inci: 'Aqua', typical: '100' }]);
	await shop.material('GLY', [{ inci: 'Glycerin', typical: '100' }]);
	await shop.material('BET', [{ inci: 'Betaine', typical: '100' }]);
});
afterAll(() => owner.end());

const refusal = (code: string) => expect.objectContaining({ code });
const withGlycerin = (percent: string) =>
	[
		['GLY', percent],
		['BET', '3'],
		['WATER', 'rest']
	] as const;

async function product(code: string): Promise<string> {
	await shop.formula(code, withGlycerin('5'));
	return shop.product(client, `Cream ${code}`, code);
}
async function forClient(slug: string, change: Parameters<typeof filledDraft>[0] = {}): Promise<string> {
	const id = await createCopy(officer, slug, await shop.packOf(slug), 'EU');
	await saveCopy(officer, slug, id, filledDraft(change));
	await submitCopy(officer, slug, id, '');
	await approveForLaboratory(officer, slug, id, '');
	return id;
}
async function approve(slug: string, id: string): Promise<void> {
	const { needs } = await readCounterProduct(client, slug);
	await approveAsClient(client, slug, id, needs.find((copy) => copy.id === id)?.contentHash ?? '');
}
const text = async (actor: Actor, slug: string, id: string) =>
	new TextDecoder().decode((await downloadCopy(actor, slug, id, 'txt')).body);
const json = async (actor: Actor, slug: string, id: string): Promise<Record<string, unknown>> =>
	JSON.parse(new TextDecoder().decode((await downloadCopy(actor, slug, id, 'json')).body));

describe('a client’s side', () => {
	test('has the own products only, and no word of another’s', async () => {
		const slug = await product('C-OWN');
		expect((await readCounter(stranger)).products).toEqual([]);
		expect((await readCounter(client)).products).toContainEqual({ slug, name: 'Cream C-OWN' });
		await expect(readCounterProduct(stranger, slug)).rejects.toThrow(refusal('not-found'));
		await expect(readCounterProduct(stranger, 'no-such-product')).rejects.toThrow(refusal('not-found'));
		expect(() => readCounterProduct(officer, slug)).toThrow(refusal('forbidden'));
	});
	test('knows of a copy only when the laboratory has approved it', async () => {
		const slug = await product('C-LATER');
		const id = await createCopy(officer, slug, await shop.packOf(slug), 'EU');
		await saveCopy(officer, slug, id, filledDraft());
		await submitCopy(officer, slug, id, '');
		expect(await readCounterProduct(client, slug)).toMatchObject({
			needs: [],
			approved: [],
			corrected: [],
			sentBack: []
		});
		await expect(downloadCopy(client, slug, id, 'txt')).rejects.toThrow(refusal('not-found'));
		await approveForLaboratory(officer, slug, id, '');
		const { needs } = await readCounterProduct(client, slug);
		expect(needs).toHaveLength(1);
		expect(needs[0]?.elements.find(({ element }) => element === 'ingredients')?.text).toBe('Aqua, Glycerin, Betaine');
		await expect(downloadCopy(stranger, slug, id, 'txt')).rejects.toThrow(refusal('not-found'));
	});
	test('tells what changed against the copy that was approved before', async () => {
		const slug = await product('C-DIFF');
		await approve(slug, await forClient(slug));
		const next = await forClient(slug, { months: '6' });
		const { needs } = await readCounterProduct(client, slug);
		expect(needs).toMatchObject([
			{
				id: next,
				changedFrom: 1,
				changes: [{ element: 'durability', before: 'Open jar: 12 M', after: 'Open jar: 6 M' }]
			}
		]);
	});
	test('is told of a change without the name of a material or its supplier', async () => {
		const slug = await product('C-QUIET');
		await shop.material('SEC', [
			{ inci: 'Squalane', typical: '60' },
			{ inci: 'Tocopherol', typical: '40' }
		]);
		await shop.formula('C-SECRET', [
			['SEC', '10'],
			['WATER', 'rest']
		]);
		const secret = await shop.product(client, 'Secret', 'C-SECRET');
		const id = await forClient(secret);
		await approve(secret, id);
		await shop.material(
			'SEC',
			[
				{ inci: 'Squalane', typical: '40' },
				{ inci: 'Tocopherol', typical: '60' }
			],
			false
		);
		const view = await readCounterProduct(client, secret);
		expect(view.approved).toMatchObject([{ outOfDate: true, effects: [{ causeKind: 'material', cause: null }] }]);
		const said =
			JSON.stringify(view) + (await text(client, secret, id)) + JSON.stringify(await json(client, secret, id));
		expect(said).not.toMatch(/Trade SEC|Quillstone/);
		// The laboratory reads the cause by its name.
		expect(await text(officer, secret, id)).toContain('Trade SEC');
		expect((await readCounterProduct(client, slug)).approved).toEqual([]);
	});
	test('a copy whose list moved while it waited asks nothing of the client', async () => {
		const slug = await product('C-MOVED');
		const id = await forClient(slug);
		await shop.formula('C-MOVED', withGlycerin('2'), false);
		expect(await readCounterProduct(client, slug)).toMatchObject({ needs: [], corrected: [{ id }] });
	});
	test('keeps the own comment of what was sent back, and not the laboratory’s', async () => {
		const slug = await product('C-BACK');
		const id = await forClient(slug);
		await sendBackCopy(client, slug, id, 'Please say “evening cream”.');
		const { sentBack } = await readCounterProduct(client, slug);
		expect(sentBack).toMatchObject([
			{ id, approvals: [{ comment: null }, { comment: 'Please say “evening cream”.' }] }
		]);
		await expect(downloadCopy(client, slug, id, 'txt')).rejects.toThrow(refusal('not-found'));
	});
});

describe('a download', () => {
	test('carries a mark until the client has approved, and again when the copy is out of date', async () => {
		const slug = await product('C-MARK');
		const id = await forClient(slug);
		expect(await json(client, slug, id)).toMatchObject({ forPrint: false, mark: 'Awaits the client, not for print' });
		expect(await text(client, slug, id)).toMatch(/^\*\*\* Awaits the client/);
		await approve(slug, id);
		expect(await json(client, slug, id)).toMatchObject({ forPrint: true, mark: null });
		expect(await text(client, slug, id)).not.toContain('***');
		await putCopyInUse(officer, slug, { copyId: id, firstBatch: '26-131', lastBatch: '' });
		expect(await json(client, slug, id)).toMatchObject({ forPrint: true, state: 'inUse' });
		await shop.formula('C-MARK', withGlycerin('2'), false);
		expect(await json(client, slug, id)).toMatchObject({ forPrint: false, mark: 'Out of date, not for print' });
	});
	test('of an approved copy that a later one overtook is marked', async () => {
		const slug = await product('C-OVER');
		const first = await forClient(slug);
		await approve(slug, first);
		await approve(slug, await forClient(slug));
		expect(await json(client, slug, first)).toMatchObject({ forPrint: false, mark: 'Superseded, not for print' });
		expect((await readCounterProduct(client, slug)).approved).toMatchObject([{ number: 2 }]);
	});
	test('has a name that says client, product, pack, market, number and date', async () => {
		const slug = await product('C-NAME');
		const id = await forClient(slug);
		const { fileName, mediaType } = await downloadCopy(client, slug, id, 'txt');
		expect(fileName).toMatch(/^Pell-and-Fennick_Cream-C-NAME_Carton_EU_copy-1_\d{4}-\d{2}-\d{2}\.txt$/);
		expect(mediaType).toBe('text/plain; charset=utf-8');
	});
	test('of a draft reads its list from the composition', async () => {
		const slug = await product('C-DRAFT');
		const id = await createCopy(officer, slug, await shop.packOf(slug), 'EU');
		expect(await text(officer, slug, id)).toContain('Ingredients: Aqua, Glycerin, Betaine');
		expect(await json(officer, slug, id)).toMatchObject({ mark: 'Draft, not for print', number: null });
	});
	test('as PDF is the same file twice', async () => {
		process.env.BUILD_WORKER_DIR = join(process.cwd(), 'build-worker');
		const slug = await product('C-PDF');
		const id = await forClient(slug);
		const [one, two] = [await downloadCopy(client, slug, id, 'pdf'), await downloadCopy(client, slug, id, 'pdf')];
		expect(new TextDecoder().decode(one.body.slice(0, 5))).toBe('%PDF-');
		expect(Buffer.from(one.body).equals(Buffer.from(two.body))).toBe(true);
	});
});

describe('an issue of the product file', () => {
	async function issue(slug: string, number: number, shared: boolean): Promise<void> {
		const { rows } = await owner.query('select id, client_id from product where slug = $1', [slug]);
		const scope = [rows[0].id, rows[0].client_id];
		const id = newId();
		const hash = String(number).repeat(64);
		await owner.query(
			`insert into product_file (id, product_id, client_id, number, formula_version_id, data_hash, open_needs, requested_by)
			select $1, $2, $3, $4, v.id, $5, 0, $6 from formula_version v limit 1`,
			[id, ...scope, number, hash, officer.personId]
		);
		await owner.query(
			`insert into file_object (sha256, bytes, media_type, pages, created_by) values ($1, 10, 'application/pdf', 1, $2)`,
			[hash, officer.personId]
		);
		await owner.query(
			'insert into product_file_built (product_file_id, product_id, client_id, sha256, pages) values ($1, $2, $3, $4, 1)',
			[id, ...scope, hash]
		);
		if (!shared) return;
		await owner.query(
			`insert into product_file_share (id, product_file_id, product_id, client_id, why, by_person) values ($1, $2, $3, $4, 'asked', $5)`,
			[newId(), id, ...scope, officer.personId]
		);
	}
	test('is known by number, date and hash, and fetched only when it was shared', async () => {
		const slug = await product('C-FILE');
		await issue(slug, 1, false);
		await issue(slug, 2, true);
		expect((await readCounterProduct(client, slug)).issues).toMatchObject([
			{ number: 2, shared: true, sha256: '2'.repeat(64) },
			{ number: 1, shared: false, sha256: '1'.repeat(64) }
		]);
		await expect(sharedIssueAddress(client, slug, 1)).rejects.toThrow(refusal('not-found'));
		await expect(sharedIssueAddress(stranger, slug, 2)).rejects.toThrow(refusal('not-found'));
		await expect(sharedIssueAddress(client, slug, 3)).rejects.toThrow(refusal('not-found'));
		expect(await sharedIssueAddress(client, slug, 2)).toContain('2'.repeat(64));
	});
});
