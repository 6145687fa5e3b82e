import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '$lib/server/access/actor';
import { closePool } from '$lib/server/db/pool';
import { productBySlug } from '$lib/server/db/products';
import { withActor } from '$lib/server/db/with-actor';
import { Refused } from '$lib/server/refused';
import { addClaim, answerClaim, linkEvidence, readClaims } from '$lib/server/services/claims';
import { sharedIssueAddress } from '$lib/server/services/counter';
import { fileDocument, storeBytes } from '$lib/server/services/documents';
import { decideNeed, readinessOf } from '$lib/server/services/file-readiness';
import { buildFile, readFilePage, requestFile, shareFile } from '$lib/server/services/product-files';
import { CRITERIA } from '$lib/schemas/claim';
import { testVariable } from './support/database';
import { Workshop } from './support/label';

const owner = new pg.Client({ connectionString: testVariable('DATABASE_OWNER_URL') });
const WATER = [{ inci: 'Aqua', typical: '100' }];
const GLYCERIN = [{ inci: 'Glycerin', typical: '100' }];
/** A one-page PDF by hand, small enough to read. */
const PDF = new TextEncoder().encode(
	'%PDF-1.4\n1 0 obj<</Type/Catalog/Pages 2 0 R>>endobj\n2 0 obj<</Type/Pages/Kids[3 0 R]/Count 1>>endobj\n3 0 obj<</Type/Page/Parent 2 0 R/MediaBox[0 0 200 200]>>endobj\ntrailer<</Root 1 0 R>>\n%%EOF'
);

let workshop: Workshop;
let client: Actor;
let slug: string;
beforeAll(async () => {
	await owner.connect();
	workshop = await Workshop.open(owner);
	client = await workshop.client('Pell & Fennick');
	await workshop.material('WATER', WATER);
	await workshop.material('GLY', GLYCERIN);
	await workshop.formula('F-1', [
		['WATER', 'rest'],
		['GLY', '5']
	]);
	slug = await workshop.product(client, 'Nightfold Cream', 'F-1');
});
afterAll(async () => {
	await owner.end();
	await closePool();
});

const section = (name: string) =>
	withActor(workshop.officer, async (trx) => {
		const { sections } = await readinessOf(trx, await productBySlug(trx, slug));
		return sections.find((each) => each.section === name);
	});

/** Files a report for a need of the product, on the formula version that answers now. */
async function report(
	need: string,
	kind: 'stabilityReport' | 'specification' | 'effectStudy',
	expires: string | null = null
) {
	const { product, formulaVersionId } = await readFilePage(workshop.officer, slug);
	return withActor(workshop.formulator, async (trx) => {
		const bytes = new Uint8Array([...PDF, ...new TextEncoder().encode(`\n% ${need} ${kind} ${expires}`)]);
		const file = await storeBytes(trx, workshop.formulator, {
			bytes,
			mediaType: 'application/pdf',
			fileName: `${kind}.pdf`
		});
		return fileDocument(trx, workshop.formulator, file, {
			kind,
			title: `${kind} of ${need}`,
			dated: '2026-01-01',
			expires,
			subjects: [{ kind: 'product', id: product.id, need, formulaVersionId }]
		});
	});
}

describe('readiness is computed from what is filed', () => {
	test('a heading with nothing filed has not begun', async () =>
		expect((await section('a2'))?.readiness).toBe('notBegun'));
	test('with both documents it is ready', async () => {
		await report('a2.stability', 'stabilityReport');
		await report('a2.specification', 'specification', '2099-01-01');
		expect((await section('a2'))?.readiness).toBe('ready');
	});
	test('another formula version makes the report out of date and leaves the specification alone', async () => {
		await workshop.formula(
			'F-1',
			[
				['WATER', 'rest'],
				['GLY', '6']
			],
			false
		);
		const reading = await section('a2');
		expect(reading?.readiness).toBe('outOfDate');
		expect(reading?.needs.map(({ state }) => state)).toEqual(['outOfDate', 'present']);
	});
	test('the officer sets a need not applicable with a reason; a formulator may not', async () => {
		const input = { need: 'a9.effects', applicable: false, reason: 'Not yet placed on the market.' };
		expect(() => decideNeed(workshop.formulator, slug, input)).toThrow(Refused);
		await decideNeed(workshop.officer, slug, input);
		expect((await section('a9'))?.readiness).toBe('ready');
		await decideNeed(workshop.officer, slug, { ...input, applicable: true, reason: 'Placed.' });
		expect((await section('a9'))?.readiness).toBe('notBegun');
	});
});

describe('a claim is supported by six answers and evidence that fits', () => {
	test('from not yet to supported, and out of date with the next formula version', async () => {
		const claimId = await addClaim(workshop.officer, slug, { wording: 'Moisturises for 24 hours', kind: 'hydration' });
		const state = async () => (await readClaims(workshop.officer, slug)).claims.find(({ id }) => id === claimId)?.state;
		expect(await state()).toBe('notYet');
		const answers = Object.fromEntries(CRITERIA.map((criterion) => [criterion, `Answer on ${criterion}.`])) as Record<
			(typeof CRITERIA)[number],
			string
		>;
		await answerClaim(workshop.officer, slug, { claimId, rev: 1, wording: 'Moisturises for 24 hours', ...answers });
		expect(await state()).toBe('notYet');
		const documentId = await report('effect.claims', 'effectStudy');
		await linkEvidence(workshop.officer, slug, { claimId, documentId });
		expect(await state()).toBe('supported');
		await workshop.formula(
			'F-1',
			[
				['WATER', 'rest'],
				['GLY', '7']
			],
			false
		);
		expect(await state()).toBe('outOfDate');
	});
	test('two people who answer at once: the second learns of the first', async () => {
		const claimId = await addClaim(workshop.officer, slug, { wording: 'Soft skin', kind: 'skin' });
		const empty = Object.fromEntries(CRITERIA.map((criterion) => [criterion, ''])) as Record<
			(typeof CRITERIA)[number],
			string
		>;
		await answerClaim(workshop.officer, slug, { claimId, rev: 1, wording: 'Softer skin', ...empty });
		await expect(
			answerClaim(workshop.officer, slug, { claimId, rev: 1, wording: 'Softest skin', ...empty })
		).rejects.toThrow('conflict');
	});
});

describe('built files', () => {
	const idOf = async (number: number) => {
		const { rows } = await owner.query<{ id: string }>(
			'select f.id from product_file f join product p on p.id = f.product_id where p.slug = $1 and f.number = $2',
			[slug, number]
		);
		return rows[0]?.id ?? '';
	};
	test('numbers have no gap, also when two are requested at once', async () => {
		await Promise.all([requestFile(workshop.officer, slug), requestFile(workshop.officer, slug)]);
		const { files } = await readFilePage(workshop.officer, slug);
		expect(files.map(({ number }) => number)).toEqual([2, 1]);
	});
	test('what was frozen is printed, and building twice changes nothing', async () => {
		const printed: unknown[] = [];
		const render = async (data: unknown) => {
			printed.push(data);
			return PDF;
		};
		await buildFile(workshop.officer, await idOf(1), () => undefined, render);
		await buildFile(workshop.officer, await idOf(1), () => undefined, render);
		expect(printed[0]).toMatchObject({
			productName: 'Nightfold Cream',
			issue: { number: 1 },
			formula: { code: 'F-1', version: 3 }
		});
		const file = (await readFilePage(workshop.officer, slug)).files.find(({ number }) => number === 1);
		expect(file).toMatchObject({ pages: 1, shared: false });
		expect(file?.sha256).toHaveLength(64);
	});
	test('the client downloads a file only once it is shared, and never reads its content', async () => {
		await expect(sharedIssueAddress(client, slug, 1)).rejects.toThrow('not-found');
		await shareFile(workshop.officer, slug, 1, 'Asked for by the client.');
		expect(await sharedIssueAddress(client, slug, 1)).toContain('X-Amz-Signature');
		const content = await withActor(client, (trx) => trx.selectFrom('product_file_content').selectAll().execute());
		expect(content).toEqual([]);
	});
});
