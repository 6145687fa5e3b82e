import { join } from 'node:path';
import { sql } from 'kysely';
import { countReady, type NeedReading, type SectionReading } from '$lib/domain/file/readiness';
import type { ProductFileData } from '../../../../templates/pdf/types';
import { phrasesIn } from '../../../../templates/phrases/index';
import { may, requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { config } from '../config';
import { boundDocuments, needDecisions, type BoundDocument, type NeedDecisionRow } from '../db/file-facts';
import { newId } from '../db/id';
import { productBySlug, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { contentHash } from '../hash';
import { enqueue } from '../jobs/queue';
import { renderInChild } from '../pdf/render-in-child';
import { Refused } from '../refused';
import { bucket } from '../storage/bucket';
import { storeBytes } from './documents';
import { fileData } from './file-print';
import { readinessOf } from './file-readiness';
import { ITEM, openWordsOf, whyOf } from './file-words';

/** A file of some hundred pages is laid out within these. */
const BUILD_MS = 120_000;
const BUILD_MB = 768;
const DOWNLOAD_SECONDS = 300;

export interface BuiltFile {
	readonly number: number;
	readonly requestedAt: Date;
	readonly by: string;
	readonly openNeeds: number;
	readonly sha256: string | null;
	readonly pages: number | null;
	readonly shared: boolean;
}
export interface NeedView {
	readonly key: string;
	readonly item: string;
	readonly words: string;
	readonly state: NeedReading['state'];
	readonly supply: NeedReading['need']['source'];
}
export interface SectionView {
	readonly section: SectionReading['section'];
	readonly readiness: SectionReading['readiness'];
	readonly title: string;
	readonly law: string;
	readonly open: string;
	readonly needs: readonly NeedView[];
}
export interface FilePage {
	readonly product: ProductRow;
	readonly sections: readonly SectionView[];
	readonly count: { readonly ready: number; readonly all: number };
	readonly evidence: readonly BoundDocument[];
	readonly decisions: readonly NeedDecisionRow[];
	readonly files: readonly BuiltFile[];
	readonly formulaVersionId: string | null;
	/** The build under way, if any. */
	readonly jobId: string | null;
	readonly mayBuild: boolean;
	readonly mayAttach: boolean;
}

export function readFilePage(actor: Actor, slug: string): Promise<FilePage> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const { sections, reading } = await readinessOf(trx, product);
		const ids = [...new Set(sections.flatMap(({ needs }) => needs.flatMap(({ documents }) => documents)))];
		return {
			product,
			sections: sections.map(sectionView),
			count: countReady(sections),
			evidence: await boundDocuments(trx, ids),
			decisions: await needDecisions(trx, product.id),
			files: await filesOf(trx, product.id),
			formulaVersionId: reading.kind === 'nothingReleased' ? null : reading.basis.formulaVersion.id,
			jobId: await runningJob(trx, product.id),
			mayBuild: may(actor, 'buildFile'),
			mayAttach: may(actor, 'attachDocument')
		};
	});
}

const sectionView = (section: SectionReading): SectionView => ({
	section: section.section,
	readiness: section.readiness,
	title: phrasesIn('en').sections[section.section].title,
	law: phrasesIn('en').sections[section.section].law,
	open: openWordsOf(section),
	needs: section.needs.map((reading) => ({
		key: reading.need.key,
		item: ITEM[reading.need.key] ?? reading.need.key,
		words: whyOf(reading),
		state: reading.state,
		supply: reading.need.source
	}))
});

const filesOf = (trx: Trx, productId: string): Promise<BuiltFile[]> =>
	trx
		.selectFrom('product_file')
		.innerJoin('person', 'person.id', 'product_file.requested_by')
		.leftJoin('product_file_built', 'product_file_built.product_file_id', 'product_file.id')
		.select([
			'product_file.number',
			'product_file.requested_at as requestedAt',
			'person.name as by',
			'product_file.open_needs as openNeeds',
			'product_file_built.sha256',
			'product_file_built.pages',
			sql<boolean>`exists (select 1 from product_file_share s where s.product_file_id = product_file.id)`.as('shared')
		])
		.where('product_file.product_id', '=', productId)
		.orderBy('product_file.number', 'desc')
		.execute();

async function runningJob(trx: Trx, productId: string): Promise<string | null> {
	const row = await trx
		.selectFrom('job_progress')
		.select('job_id')
		.where('kind', '=', 'build-product-file')
		.where('subject', '=', `product/${productId}`)
		.where('state', 'in', ['queued', 'running'])
		.orderBy('created_at', 'desc')
		.executeTakeFirst();
	return row?.job_id ?? null;
}

/** Freezes what the file will print, takes the next number and queues the build, in one transaction. */
export function requestFile(actor: Actor, slug: string): Promise<string> {
	requireAct(actor, 'buildFile');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const readiness = await readinessOf(trx, product);
		if (readiness.reading.kind === 'nothingReleased') throw new Refused('blocked', { why: 'nothingReleased' });
		const id = newId();
		const number = await nextNumber(trx, product.id);
		const data = await fileData(trx, actor, product, readiness, { number, on: today() });
		const open = readiness.sections
			.flatMap(({ needs }) => needs)
			.filter(({ state }) => state === 'missing' || state === 'outOfDate');
		await trx
			.insertInto('product_file')
			.values({
				id,
				product_id: product.id,
				client_id: product.clientId,
				number,
				formula_version_id: readiness.reading.basis.formulaVersion.id,
				data_hash: contentHash(data),
				open_needs: open.length,
				requested_by: actor.personId
			})
			.execute();
		await trx
			.insertInto('product_file_content')
			.values({ product_file_id: id, data: JSON.stringify(data) })
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'product', id: product.id },
			action: 'file-requested',
			subject: `product-file/${id}`,
			after: { number, dataHash: contentHash(data), open: open.length }
		});
		return enqueue(trx, actor, 'build-product-file', `product/${product.id}`, { productFileId: id });
	});
}

/** The next number of a product's files; the counter's row stays locked until the transaction ends. */
async function nextNumber(trx: Trx, productId: string): Promise<number> {
	const row = await trx
		.insertInto('counter')
		.values({ scope: `file/${productId}`, next: 2 })
		.onConflict((conflict) => conflict.column('scope').doUpdateSet({ next: sql<number>`counter.next + 1` }))
		.returning('next')
		.executeTakeFirstOrThrow();
	return row.next - 1;
}

export type Render = (
	data: ProductFileData,
	creationDate: string,
	onPercent: (percent: number) => void
) => Promise<Uint8Array>;

export const renderFile: Render = (data, creationDate, onPercent) =>
	renderInChild(
		{ kind: 'product-file', data, creationDate },
		{
			childPath: join(config().buildWorkerDir, 'pdf-child.js'),
			timeoutMs: BUILD_MS,
			maxOldSpaceMb: BUILD_MB,
			onProgress: (progress) => onPercent(progress.step === 'writing' ? progress.percent : 0)
		}
	);

/** Builds what was frozen. Safe to run twice: the same data gives the same bytes, and a built file stays. */
export async function buildFile(
	actor: Actor,
	productFileId: string,
	onPercent: (percent: number) => void,
	render: Render = renderFile
): Promise<string> {
	const { file, data } = await withActor(actor, async (trx) => ({
		file: await trx
			.selectFrom('product_file')
			.innerJoin('product', 'product.id', 'product_file.product_id')
			.selectAll('product_file')
			.select('product.slug')
			.where('product_file.id', '=', productFileId)
			.executeTakeFirstOrThrow(),
		data: (
			await trx
				.selectFrom('product_file_content')
				.select('data')
				.where('product_file_id', '=', productFileId)
				.executeTakeFirstOrThrow()
		).data as ProductFileData
	}));
	const bytes = await render(data, file.requested_at.toISOString(), onPercent);
	await withActor(actor, async (trx) => {
		const fileName = `${file.slug}-product-file-${file.number}.pdf`;
		const stored = await storeBytes(trx, actor, { bytes, mediaType: 'application/pdf', fileName });
		const object = await trx
			.selectFrom('file_object')
			.select('pages')
			.where('sha256', '=', stored.sha256)
			.executeTakeFirstOrThrow();
		await trx
			.insertInto('product_file_built')
			.values({
				product_file_id: productFileId,
				product_id: file.product_id,
				client_id: file.client_id,
				sha256: stored.sha256,
				pages: object.pages ?? 0
			})
			.onConflict((conflict) => conflict.column('product_file_id').doNothing())
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'product', id: file.product_id },
			action: 'file-built',
			subject: `product-file/${productFileId}`,
			after: { number: file.number, sha256: stored.sha256, pages: object.pages }
		});
	});
	return `/products/${file.slug}/file/${file.number}`;
}

/** A short-lived address of a built file, for staff. @throws Refused 'not-found' while it is not built. */
export async function fileAddress(actor: Actor, slug: string, number: number): Promise<string> {
	requireAct(actor, 'readLaboratory');
	const found = await withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		return { product, file: (await filesOf(trx, product.id)).find((each) => each.number === number) };
	});
	if (!found.file?.sha256) throw new Refused('not-found');
	const parts = [
		found.product.clientName,
		found.product.name,
		`product file ${number}`,
		found.file.requestedAt.toISOString().slice(0, 10)
	];
	return bucket().signedDownload(found.file.sha256, {
		fileName: `${parts.map((part) => part.replace(/[_\s]+/g, '-')).join('_')}.pdf`,
		mediaType: 'application/pdf',
		disposition: 'attachment',
		seconds: DOWNLOAD_SECONDS
	});
}

/** Lets the client of the product download this file; who, when and why are recorded. */
export function shareFile(actor: Actor, slug: string, number: number, why: string): Promise<void> {
	requireAct(actor, 'shareFile');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const file = await trx
			.selectFrom('product_file')
			.innerJoin('product_file_built', 'product_file_built.product_file_id', 'product_file.id')
			.select('product_file.id')
			.where('product_file.product_id', '=', product.id)
			.where('number', '=', number)
			.executeTakeFirst();
		if (!file) throw new Refused('not-found');
		await trx
			.insertInto('product_file_share')
			.values({
				id: newId(),
				product_file_id: file.id,
				product_id: product.id,
				client_id: product.clientId,
				why,
				by_person: actor.personId
			})
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'product', id: product.id },
			action: 'file-shared',
			subject: `product-file/${file.id}`,
			reason: why
		});
	});
}
