import { join } from 'node:path';
import { copyElements } from '$lib/domain/label/elements';
import { elementsJson, plainCopy } from '$lib/domain/label/forms';
import type { CopyFault, ElementRow, LabelContent, LabelElement, ListStanding } from '$lib/domain/label/types';
import { RULE_BOOK_NAME, ruleById } from '$lib/reference';
import type { ApprovalView } from '$lib/schemas/copy-view';
import type { CopyBasis, DownloadForm } from '$lib/schemas/label-copy';
import { markOf } from '../../../../templates/pdf/mark';
import type {
	ElementPrint,
	FormulaPrint,
	IngredientPrint,
	LabelCopyData,
	PrintedElement
} from '../../../../templates/pdf/types';
import { phrasesIn } from '../../../../templates/phrases/index';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import { config } from '../config';
import { approvalsOf, basesOf, copyById, effectsOf, type CopyRow } from '../db/copies';
import { productBySlug, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { renderInChild } from '../pdf/render-in-child';
import { Refused } from '../refused';
import { cleanFileName } from '../storage/upload-rules';
import { SHOWN_TO_CLIENT } from './copies';
import { judge, standingOf, WORDS } from './copy-standing';
import { day, instant, openWords, outOfDateWords, rulesWords } from './copy-words';
import { readProduct, type Reading } from './readings';

export interface CopyDownload {
	readonly fileName: string;
	readonly mediaType: string;
	readonly body: Uint8Array<ArrayBuffer>;
}

const MARKETS: Readonly<Record<string, string>> = { EU: 'European Union', GB: 'UK (GB)' };
const MEDIA_TYPE: Readonly<Record<DownloadForm, string>> = {
	pdf: 'application/pdf',
	txt: 'text/plain; charset=utf-8',
	json: 'application/json; charset=utf-8'
};
/** A page or two of text; more means that something is wrong. */
const PRINT_MS = 30_000;
const PRINT_MB = 256;

interface Printed {
	readonly product: ProductRow;
	readonly row: CopyRow;
	readonly content: LabelContent;
	readonly data: LabelCopyData;
	/** The instant of the last decision: the same copy always prints the same bytes. */
	readonly madeAt: string;
}

/**
 * A copy as PDF, text or JSON. Only what the client approved or what is in use, and still true, comes without a mark.
 * @throws Refused 'not-found', for a client also before the laboratory has approved.
 */
export async function downloadCopy(
	actor: Actor,
	slug: string,
	copyId: string,
	form: DownloadForm
): Promise<CopyDownload> {
	requireAct(actor, actor.side === 'client' ? 'approveCopyAsClient' : 'readLaboratory');
	const printed = await withActor(actor, (trx) => printedCopy(trx, actor, slug, copyId));
	return {
		fileName: fileNameOf(printed, form),
		mediaType: MEDIA_TYPE[form],
		body: await bodyOf(printed, form)
	};
}

async function bodyOf(printed: Printed, form: DownloadForm): Promise<Uint8Array<ArrayBuffer>> {
	if (form === 'txt') return new TextEncoder().encode(textOf(printed));
	if (form === 'json') return new TextEncoder().encode(`${JSON.stringify(jsonOf(printed), null, '\t')}\n`);
	const pdf = await renderInChild(
		{ kind: 'label-copy', data: printed.data, creationDate: printed.madeAt },
		{ childPath: join(config().buildWorkerDir, 'pdf-child.js'), timeoutMs: PRINT_MS, maxOldSpaceMb: PRINT_MB }
	);
	return new Uint8Array(pdf);
}

function fileNameOf({ product, row, madeAt }: Printed, form: DownloadForm): string {
	const number = row.number === null ? row.state : `copy ${row.number}`;
	const parts = [product.clientName, product.name, row.packName, row.market, number, madeAt.slice(0, 10)];
	// An underscore parts the name; inside a part a hyphen takes its place, so that the parts can be told again.
	return cleanFileName(`${parts.map((part) => part.replace(/[_/\\]+/g, '-').replace(/\s+/g, '-')).join('_')}.${form}`);
}

/** What is printed of a copy; also the product file binds it. */
export async function printedCopy(trx: Trx, actor: Actor, slug: string, copyId: string): Promise<Printed> {
	const product = await productBySlug(trx, slug);
	const row = await copyById(trx, product.id, copyId);
	const forClient = actor.side === 'client';
	if (forClient && !SHOWN_TO_CLIENT.includes(row.state)) throw new Refused('not-found');
	const approvals = (await approvalsOf(trx, [row.id])).get(row.id) ?? [];
	const cause = await causeOf(trx, row, forClient);
	// A client cannot read the composition, and has no draft whose list would have to be read from it.
	const reading = forClient ? null : await readProduct(trx, product, today());
	const list = reading && standingOf(reading, row.beingRechecked);
	const content = row.state === 'draft' ? { ...row.content, ingredients: listText(list) } : row.content;
	const madeAt = [row.createdAt.toISOString(), row.listedAt?.toISOString() ?? '', ...approvals.map(({ at }) => at)]
		.sort()
		.at(-1);
	const formula = row.basis
		? frozenFormula(product, row.basis, forClient)
		: await presentFormula(trx, product, reading);
	const around = { product, row, content, approvals, cause, list, formula, forClient, madeAt: madeAt ?? '' };
	return { product, row, content, data: printData(around), madeAt: around.madeAt };
}

const frozenFormula = (product: ProductRow, basis: CopyBasis, forClient: boolean): FormulaPrint => ({
	// A client knows the formula by the own code, where there is one.
	code: (forClient ? product.clientCode : null) ?? basis.formulaCode,
	version: basis.formulaNumber,
	basis: basis.number,
	released: day(basis.releasedOn)
});

/** What a draft would rest on if it were submitted now. */
async function presentFormula(trx: Trx, product: ProductRow, reading: Reading | null): Promise<FormulaPrint> {
	const basis = reading === null || reading.kind === 'nothingReleased' ? null : reading.basis;
	if (!basis) return { code: product.formulaCode, version: 0, basis: 0, released: null };
	const bases = await basesOf(trx, product.id);
	const known = bases.indexOf(basis.hash);
	return {
		code: product.formulaCode,
		version: basis.formulaVersion.number,
		basis: known < 0 ? bases.length + 1 : known + 1,
		released: day(basis.formulaVersion.releasedAt.toISOString())
	};
}

const listText = (list: ListStanding | null) => (list?.kind === 'list' ? list.text : '');

/** Why a copy is out of date, in words; a client learns what kind of thing changed and never which supplier's. */
async function causeOf(trx: Trx, row: CopyRow, forClient: boolean): Promise<string | null> {
	if (row.beingRechecked && row.state !== 'draft') return outOfDateWords(null, null);
	if (!row.outOfDate) return null;
	const effects = (await effectsOf(trx, [row.id])).get(row.id) ?? [];
	const last = effects.find(({ effect }) => effect === 'saysSomethingElse');
	return outOfDateWords(last?.causeKind ?? null, forClient ? null : (last?.cause ?? null));
}

interface Around extends Omit<Printed, 'data'> {
	readonly approvals: readonly ApprovalView[];
	readonly cause: string | null;
	readonly list: ListStanding | null;
	readonly formula: FormulaPrint;
	readonly forClient: boolean;
}

function printData(around: Around): LabelCopyData {
	const { product, row, content, approvals, list } = around;
	const faults = row.state === 'draft' && list ? judge(row.content, list).faults : [];
	const rows = copyElements(content, WORDS);
	return {
		language: 'en',
		productName: product.name,
		brandName: content.brand,
		clientName: product.clientName,
		packName: row.packName,
		marketName: MARKETS[row.market] ?? row.market,
		state: row.overtaken ? 'superseded' : row.state,
		outOfDate: around.cause,
		number: row.number,
		contentHash: row.contentHash,
		formula: around.formula,
		rules: rulesWords(row.basis?.ruleBook ?? RULE_BOOK_NAME),
		madeOn: instant(around.madeAt),
		compiledBy: config().workspaceName,
		inUseFrom: row.firstBatch,
		elements: rows.flatMap((each) => elementPrint(each, content)),
		list: {
			heading: WORDS.ingredients,
			names: namesOf(content, faults),
			mayContain: [],
			requiredBy: citationOf('eu-1223-2009/art-19-1-g')
		},
		open: faults.map((fault) => openWords(fault, WORDS)),
		approvals: approvals.map(({ role, decision, name, at, comment }) => ({
			role: role === 'officer' ? 'laboratory' : 'client',
			decision,
			name,
			date: day(at),
			// What the laboratory noted for itself stays there.
			comment: around.forClient && role === 'officer' ? null : comment
		}))
	};
}

/** The article alone: the act stands once, under the rules applied. */
const citationOf = (ruleId: string | null) =>
	(ruleId === null ? '' : (ruleById(ruleId)?.citation ?? '')).split(', ').at(-1) ?? '';

/** A name ends at a comma and a space; a comma inside a name has none behind it. */
function namesOf(content: LabelContent, faults: readonly CopyFault[]): IngredientPrint[] {
	const undecided = new Set(
		faults.flatMap((fault) => (fault.kind === 'orderDependsOnRange' ? [fault.before, fault.after] : []))
	);
	if (content.ingredients === '') return [];
	return content.ingredients.split(', ').map((name) => ({ name, undecided: undecided.has(name) }));
}

function elementPrint(row: ElementRow, content: LabelContent): ElementPrint[] {
	if (row.element === 'ingredients' || (row.text === null && !row.missing)) return [];
	return [
		{
			element: printedElement(row.element, content),
			text: row.text,
			requiredBy: citationOf(row.ruleId),
			prescribed: false
		}
	];
}

const printedElement = (element: Exclude<LabelElement, 'ingredients'>, content: LabelContent): PrintedElement =>
	element === 'durability' && content.durability?.kind === 'periodAfterOpening' ? 'periodAfterOpening' : element;

function markWordsOf(data: LabelCopyData): string | null {
	const mark = markOf(data);
	return mark === null ? null : phrasesIn(data.language).copy.marks[mark];
}

function textOf({ content, data }: Printed): string {
	const t = phrasesIn(data.language).copy;
	const number = data.number === null ? t.noEdition : t.edition(data.number);
	const lines = [
		`${t.running(data.productName)}, ${data.clientName}`,
		`${t.title(data.packName, data.marketName)}, ${number}, ${t.states[data.state]}`,
		...(data.outOfDate === null ? [] : [data.outOfDate]),
		...(data.contentHash === null ? [] : [`SHA-256 ${data.contentHash}`])
	];
	return plainCopy(content, WORDS, { lines, mark: markWordsOf(data) });
}

const jsonOf = ({ content, data, row, madeAt }: Printed) => ({
	mark: markWordsOf(data),
	forPrint: markOf(data) === null,
	product: data.productName,
	client: data.clientName,
	pack: data.packName,
	market: row.market,
	language: data.language,
	number: data.number,
	state: data.state,
	outOfDate: data.outOfDate,
	sha256: data.contentHash,
	madeAt,
	elements: elementsJson(content, WORDS),
	approvals: data.approvals
});
