import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { canonicalCopy } from '$lib/domain/label/forms';
import type { Actor } from '$lib/server/access/actor';
import { copyById } from '$lib/server/db/copies';
import { productBySlug } from '$lib/server/db/products';
import { withActor } from '$lib/server/db/with-actor';
import { sha256 } from '$lib/server/hash';
import {
	approveAsClient,
	approveForLaboratory,
	createCopy,
	putCopyInUse,
	saveCopy,
	sendBackCopy,
	submitCopy
} from '$lib/server/services/copies';
import { filledDraft, Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
let officer: Actor;
let client: Actor;
let stranger: Actor;
const EXACT = (inci: string) => [{ inci, typical: '100' }];

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	({ officer } = shop);
	client = await shop.client('Pell and Fennick');
	stranger = await shop.client('Harrow Quay');
	await shop.material('WATER', EXACT('Aqua'));
	await shop.material('GLY', EXACT('Glycerin'));
	await shop.material('BET', EXACT('Betaine'));
});
afterAll(() => owner.end());

const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });
const blockedBy = (kind: string) => refusal('blocked', { faults: [expect.objectContaining({ kind })] });
const LINES = [
	['GLY', '5'],
	['BET', '3'],
	['WATER', 'rest']
] as const;

/** A product of its own with a formula of its own, so that no test moves another's list. */
async function product(code: string): Promise<string> {
	await shop.formula(code, LINES);
	return shop.product(client, `Cream ${code}`, code);
}
const begin = async (slug: string) => createCopy(officer, slug, await shop.packOf(slug), 'EU');
async function inReview(slug: string, pack?: string): Promise<string> {
	const id = await createCopy(officer, slug, pack ?? (await shop.packOf(slug)), 'EU');
	await saveCopy(officer, slug, id, filledDraft());
	await submitCopy(officer, slug, id, '');
	return id;
}
async function forClient(slug: string): Promise<string> {
	const id = await inReview(slug);
	await approveForLaboratory(officer, slug, id, '');
	return id;
}
const read = (slug: string, id: string) =>
	withActor(officer, async (trx) => copyById(trx, (await productBySlug(trx, slug)).id, id));
async function approvedByClient(slug: string): Promise<string> {
	const id = await forClient(slug);
	await approveAsClient(client, slug, id, (await read(slug, id)).contentHash ?? '');
	return id;
}
const actions = async (id: string): Promise<string[]> =>
	(await owner.query('select action from audit_row where subject = $1 order by seq', [`label-copy/${id}`])).rows.map(
		(row) => row.action
	);

describe('a draft', () => {
	test('begins with what product, pack and market say and has no list of its own', async () => {
		const slug = await product('F-BEGIN');
		const { content, state, number } = await read(slug, await begin(slug));
		expect({ state, number }).toEqual({ state: 'draft', number: null });
		expect(content).toMatchObject({
			brand: 'Nightfold',
			function: 'Face cream',
			content: { size: '50', unit: 'ml', eMark: false },
			responsible: { name: 'Pell & Fennick Ltd', address: '7 Example Quay, Dublin, Ireland' },
			ingredients: '',
			durability: null
		});
	});
	test('is the only copy on its way for its pack and market', async () => {
		const slug = await product('F-ONE');
		const id = await begin(slug);
		await expect(begin(slug)).rejects.toThrow(refusal('exists', { copyId: id }));
	});
	test('names a pack and a market of the product', async () => {
		const slug = await product('F-PACK');
		const pack = await shop.packOf(slug);
		await expect(createCopy(officer, slug, officer.personId, 'EU')).rejects.toThrow(
			refusal('invalid', { field: 'packId' })
		);
		await expect(createCopy(officer, slug, pack, 'US')).rejects.toThrow(refusal('invalid', { field: 'market' }));
	});
	test('saved by two people shows the second what the first wrote', async () => {
		const slug = await product('F-TWO');
		const id = await begin(slug);
		expect(await saveCopy(officer, slug, id, filledDraft({ directions: 'first' }))).toBe(2);
		await expect(saveCopy(officer, slug, id, filledDraft({ directions: 'second' }))).rejects.toThrow(
			refusal('conflict', { rev: 2, theirs: expect.objectContaining({ directions: 'first' }) })
		);
	});
	test('is made and submitted by an officer alone', async () => {
		const slug = await product('F-ACTS');
		const id = await begin(slug);
		for (const actor of [shop.formulator, client]) {
			expect(() => saveCopy(actor, slug, id, filledDraft())).toThrow(refusal('forbidden'));
			expect(() => submitCopy(actor, slug, id, '')).toThrow(refusal('forbidden'));
			expect(() => approveForLaboratory(actor, slug, id, '')).toThrow(refusal('forbidden'));
		}
		expect(() => approveAsClient(officer, slug, id, '')).toThrow(refusal('forbidden'));
	});
});

describe('review', () => {
	test('freezes words and list under one hash, and the list rests on today’s projection', async () => {
		const slug = await product('F-FREEZE');
		const id = await inReview(slug);
		const copy = await read(slug, id);
		expect(copy).toMatchObject({ state: 'inReview', number: null, outOfDate: false, beingRechecked: false });
		expect(copy.content.ingredients).toBe('Aqua, Glycerin, Betaine');
		expect(copy.contentHash).toBe(sha256(canonicalCopy(copy.content)));
		expect(copy.basis).toMatchObject({ formulaCode: 'F-FREEZE', formulaNumber: 1, number: 1 });
		const { rows } = await owner.query(
			`select s.kind, s.text_hash, r.hash = p.hash as same from label_copy c
			join statement s on s.id = c.list_statement_id join statement_rests r on r.statement_id = s.id
			join projection p on p.product_id = c.product_id where c.id = $1`,
			[id]
		);
		expect(rows).toEqual([{ kind: 'list', text_hash: sha256('Aqua, Glycerin, Betaine'), same: true }]);
	});
	test('is refused while an element is missing', async () => {
		const slug = await product('F-MISS');
		const id = await begin(slug);
		await expect(submitCopy(officer, slug, id, '')).rejects.toThrow(
			refusal('blocked', { faults: [{ kind: 'missing', element: 'durability' }] })
		);
	});
	test('is refused while the order depends on a range', async () => {
		await shop.material('WEAK', [
			{ inci: 'Squalane', min: '40', max: '60' },
			{ inci: 'Coco-Caprylate', min: '40', max: '60' }
		]);
		await shop.formula('F-WEAK', [
			['WEAK', '10'],
			['WATER', 'rest']
		]);
		const slug = await shop.product(client, 'Weak', 'F-WEAK');
		const id = await begin(slug);
		await saveCopy(officer, slug, id, filledDraft());
		await expect(submitCopy(officer, slug, id, 'a reason does not help')).rejects.toThrow(
			blockedBy('orderDependsOnRange')
		);
	});
	test('is refused without a released formula', async () => {
		await shop.formula('F-NONE', LINES);
		const slug = await shop.product(client, 'None', 'F-NONE');
		const id = await begin(slug);
		await saveCopy(officer, slug, id, filledDraft());
		await owner.query(
			`update product_formula set formula_id = $1 where product_id = (select id from product where slug = $2)`,
			[await emptyFormula(), slug]
		);
		await expect(submitCopy(officer, slug, id, '')).rejects.toThrow(blockedBy('nothingReleased'));
	});
	test('is refused while the product is being re-checked', async () => {
		const slug = await product('F-CHECK');
		const id = await begin(slug);
		await saveCopy(officer, slug, id, filledDraft());
		await owner.query('update product set inputs_rev = inputs_rev + 1 where slug = $1', [slug]);
		await expect(submitCopy(officer, slug, id, '')).rejects.toThrow(blockedBy('beingRechecked'));
	});
	test('asks for a reason where a threshold is straddled, and records it with the list', async () => {
		await shop.material('SCENT', [
			{ inci: 'Parfum', typical: '100' },
			{ inci: 'Linalool', role: 'ofWhich', parent: 0, min: '0.05', max: '0.2' }
		]);
		await shop.formula('F-ASK', [
			['SCENT', '1'],
			['GLY', '5'],
			['WATER', 'rest']
		]);
		const slug = await shop.product(client, 'Ask', 'F-ASK');
		const id = await begin(slug);
		await saveCopy(officer, slug, id, filledDraft());
		await expect(submitCopy(officer, slug, id, '')).rejects.toThrow(
			refusal('blocked', { questions: [expect.objectContaining({ kind: 'threshold', name: 'Linalool' })] })
		);
		await submitCopy(officer, slug, id, 'Named to be on the safe side.');
		expect(await read(slug, id)).toMatchObject({
			why: 'Named to be on the safe side.',
			basis: { asked: ['Linalool'] }
		});
		// The reason stands; nothing new is asked at approval.
		expect(await approveForLaboratory(officer, slug, id, '')).toBe(1);
	});
	test('comes once: the second press after it is explained by the state', async () => {
		const slug = await product('F-AGAIN');
		const id = await inReview(slug);
		await expect(submitCopy(officer, slug, id, '')).rejects.toThrow(refusal('wrong-state', { state: 'inReview' }));
		await expect(saveCopy(officer, slug, id, filledDraft({ rev: 2 }))).rejects.toThrow(refusal('wrong-state'));
	});
});

async function emptyFormula(): Promise<string> {
	const { createFormula } = await import('$lib/server/services/formulas');
	await createFormula(shop.formulator, { code: 'F-EMPTY', name: 'Not released' });
	return (await owner.query(`select id from formula where code = 'F-EMPTY'`)).rows[0].id;
}

describe('from approval to the last batch', () => {
	test('every step in its order, each with its audit row', async () => {
		const slug = await product('F-WALK');
		const id = await approvedByClient(slug);
		await putCopyInUse(officer, slug, { copyId: id, firstBatch: '26-131', lastBatch: '' });
		expect(await read(slug, id)).toMatchObject({ state: 'inUse', number: 1, firstBatch: '26-131' });
		const next = await approvedByClient(slug);
		await expect(putCopyInUse(officer, slug, { copyId: next, firstBatch: '27-002', lastBatch: '' })).rejects.toThrow(
			refusal('invalid', { field: 'lastBatch' })
		);
		await putCopyInUse(officer, slug, { copyId: next, firstBatch: '27-002', lastBatch: '27-001' });
		expect(await read(slug, id)).toMatchObject({ state: 'superseded', lastBatch: '27-001' });
		expect(await read(slug, next)).toMatchObject({ state: 'inUse', number: 2 });
		expect(await actions(id)).toEqual([
			'copy-begun',
			'copy-saved',
			'copy-submitted',
			'copy-approved-by-laboratory',
			'copy-approved-by-client',
			'copy-in-use',
			'copy-superseded'
		]);
	});
	test('no step is taken out of its order or twice', async () => {
		const slug = await product('F-ORDER');
		const draft = await begin(slug);
		const use = (id: string) => putCopyInUse(officer, slug, { copyId: id, firstBatch: '1', lastBatch: '' });
		await expect(approveForLaboratory(officer, slug, draft, '')).rejects.toThrow(refusal('wrong-state'));
		await expect(use(draft)).rejects.toThrow(refusal('wrong-state'));
		await saveCopy(officer, slug, draft, filledDraft());
		await submitCopy(officer, slug, draft, '');
		await approveForLaboratory(officer, slug, draft, '');
		await expect(approveForLaboratory(officer, slug, draft, '')).rejects.toThrow(refusal('wrong-state'));
		await expect(use(draft)).rejects.toThrow(refusal('wrong-state'));
		const hash = (await read(slug, draft)).contentHash ?? '';
		await approveAsClient(client, slug, draft, hash);
		await expect(approveAsClient(client, slug, draft, hash)).rejects.toThrow(
			refusal('wrong-state', { state: 'approvedByClient' })
		);
		await expect(sendBackCopy(client, slug, draft, 'too late')).rejects.toThrow(refusal('wrong-state'));
	});
	test('two approvals at once take neighbouring numbers, and a refused one takes none', async () => {
		const slug = await product('F-GAP');
		const packs = [await shop.packOf(slug), await shop.addPack(slug, 'Tube'), await shop.addPack(slug, 'Jar')];
		const ids: string[] = [];
		for (const pack of packs) ids.push(await inReview(slug, pack));
		const [first = '', second = '', third = ''] = ids;
		const taken = await Promise.all([
			approveForLaboratory(officer, slug, first, ''),
			approveForLaboratory(officer, slug, second, ''),
			approveForLaboratory(officer, slug, first, '').catch(() => null)
		]);
		expect(taken.filter((number) => number !== null).sort()).toEqual([1, 2]);
		expect(await approveForLaboratory(officer, slug, third, '')).toBe(3);
	});
	test('an approved copy that a later one overtook is not put in use', async () => {
		const slug = await product('F-OVER');
		const first = await approvedByClient(slug);
		await approvedByClient(slug);
		await expect(putCopyInUse(officer, slug, { copyId: first, firstBatch: '1', lastBatch: '' })).rejects.toThrow(
			blockedBy('overtaken')
		);
	});
});

describe('sending back', () => {
	test('keeps the row with its comment and opens a draft with the same words', async () => {
		const slug = await product('F-BACK');
		const id = await forClient(slug);
		const next = await sendBackCopy(client, slug, id, 'Please say “evening cream”.');
		const [old, draft] = [await read(slug, id), await read(slug, next)];
		expect(old).toMatchObject({ state: 'sentBack', number: 1 });
		expect(draft).toMatchObject({ state: 'draft', number: null, replacesId: id });
		expect(draft.content).toEqual({ ...old.content, ingredients: '' });
		const { rows } = await owner.query(
			'select decision, as_role, comment from label_approval where copy_id = $1 order by at',
			[id]
		);
		expect(rows.at(-1)).toEqual({ decision: 'sentBack', as_role: 'client', comment: 'Please say “evening cream”.' });
	});
	test('an officer sends back from review; a client cannot, and does not learn of it', async () => {
		const slug = await product('F-BACK2');
		const id = await inReview(slug);
		await expect(sendBackCopy(client, slug, id, 'no')).rejects.toThrow(refusal('not-found'));
		await sendBackCopy(officer, slug, id, 'A word is wrong.');
		expect(await read(slug, id)).toMatchObject({ state: 'sentBack', number: null });
	});
});

describe('a client approves', () => {
	test('only the text that was shown', async () => {
		const slug = await product('F-HASH');
		const id = await forClient(slug);
		await expect(approveAsClient(client, slug, id, 'f'.repeat(64))).rejects.toThrow(refusal('conflict'));
	});
	test('nothing of another client, nothing before the laboratory has', async () => {
		const slug = await product('F-OTHER');
		const id = await inReview(slug);
		const hash = (await read(slug, id)).contentHash ?? '';
		await expect(approveAsClient(client, slug, id, hash)).rejects.toThrow(refusal('not-found'));
		await approveForLaboratory(officer, slug, id, '');
		await expect(approveAsClient(stranger, slug, id, hash)).rejects.toThrow(refusal('not-found'));
		await expect(sendBackCopy(stranger, slug, id, 'mine')).rejects.toThrow(refusal('not-found'));
	});
});

describe('a frozen row', () => {
	test.each([
		['content', `content = '{}'`],
		['hash', `content_hash = repeat('0', 64)`],
		['list', 'list_statement_id = null'],
		['state back to draft', `state = 'draft'`],
		['formula', 'formula_version_id = null'],
		['number', 'number = 99']
	])('refuses another %s, even by the owner of the table', async (_what, set) => {
		const slug = await product(`F-RAW-${_what.toUpperCase().replaceAll(' ', '')}`);
		const id = await forClient(slug);
		await expect(owner.query(`update label_copy set ${set} where id = $1`, [id])).rejects.toThrow(/frozen/);
	});
});

describe('a release', () => {
	const effects = async (id: string) =>
		(
			await owner.query('select effect, old_text, new_text, cause from copy_effect where copy_id = $1 order by at', [
				id
			])
		).rows;

	test('that changes the list puts the copy out of date in its own transaction and names the cause', async () => {
		const slug = await product('F-MOVE');
		const id = await forClient(slug);
		const hash = (await read(slug, id)).contentHash ?? '';
		await shop.formula(
			'F-MOVE',
			[
				['GLY', '2'],
				['BET', '3'],
				['WATER', 'rest']
			],
			false
		);
		expect(await read(slug, id)).toMatchObject({ state: 'approvedByLaboratory', outOfDate: true });
		expect(await effects(id)).toEqual([
			{
				effect: 'saysSomethingElse',
				old_text: 'Aqua, Glycerin, Betaine',
				new_text: 'Aqua, Betaine, Glycerin',
				cause: 'Formula F-MOVE, version 2'
			}
		]);
		await expect(approveAsClient(client, slug, id, hash)).rejects.toThrow(blockedBy('outOfDate'));
	});
	test('that leaves the text alone leaves the copy untouched and says so', async () => {
		const slug = await product('F-STAY');
		const id = await forClient(slug);
		await shop.formula(
			'F-STAY',
			[
				['GLY', '6'],
				['BET', '3'],
				['WATER', 'rest']
			],
			false
		);
		expect(await read(slug, id)).toMatchObject({ outOfDate: false });
		expect(await effects(id)).toMatchObject([{ effect: 'untouched' }]);
		await approveAsClient(client, slug, id, (await read(slug, id)).contentHash ?? '');
	});
	test('of a material that turns two names marks exactly the copies that print them', async () => {
		await shop.material('TURN', [
			{ inci: 'Squalane', typical: '60' },
			{ inci: 'Tocopherol', typical: '40' }
		]);
		await shop.formula('F-TURN', [
			['TURN', '10'],
			['WATER', 'rest']
		]);
		const slug = await shop.product(client, 'Turn', 'F-TURN');
		const touched = await inReview(slug);
		const other = await product('F-APART');
		const apart = await inReview(other);
		await shop.material(
			'TURN',
			[
				{ inci: 'Squalane', typical: '40' },
				{ inci: 'Tocopherol', typical: '60' }
			],
			false
		);
		expect(await read(slug, touched)).toMatchObject({ outOfDate: true });
		expect(await read(other, apart)).toMatchObject({ outOfDate: false });
		expect(await effects(apart)).toEqual([]);
		await expect(approveForLaboratory(officer, slug, touched, '')).rejects.toThrow(blockedBy('outOfDate'));
	});
	test('that only widens a range is found at the laboratory’s approval', async () => {
		await shop.material('WIDE', [
			{ inci: 'Squalane', typical: '60' },
			{ inci: 'Tocopherol', typical: '40' }
		]);
		await shop.formula('F-WIDE', [
			['WIDE', '10'],
			['WATER', 'rest']
		]);
		const slug = await shop.product(client, 'Wide', 'F-WIDE');
		const id = await inReview(slug);
		await shop.material(
			'WIDE',
			[
				{ inci: 'Squalane', min: '45', typical: '60', max: '70' },
				{ inci: 'Tocopherol', min: '30', typical: '40', max: '55' }
			],
			false
		);
		expect(await read(slug, id)).toMatchObject({ outOfDate: false });
		await expect(approveForLaboratory(officer, slug, id, '')).rejects.toThrow(blockedBy('orderDependsOnRange'));
	});
	test('an out-of-date copy is not put in use', async () => {
		const slug = await product('F-LATE');
		const id = await approvedByClient(slug);
		await shop.formula(
			'F-LATE',
			[
				['GLY', '1.5'],
				['BET', '3'],
				['WATER', 'rest']
			],
			false
		);
		await expect(putCopyInUse(officer, slug, { copyId: id, firstBatch: '1', lastBatch: '' })).rejects.toThrow(
			blockedBy('outOfDate')
		);
	});
});
