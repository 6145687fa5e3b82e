import { copyElements } from '$lib/domain/label/elements';
import type { ElementRow, LabelContent, LabelElement, ListStanding } from '$lib/domain/label/types';
import { ruleById } from '$lib/reference';
import type { CopyHead, CopyView, ElementSource, ElementView } from '$lib/schemas/copy-view';
import type { LabelQuery } from '$lib/schemas/label-copy';
import type { RuleView } from '$lib/schemas/list-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import { approvalsOf, copiesOf, effectsOf, headOf, type CopyRow } from '../db/copies';
import { marketsOf, packsOf, productBySlug, type MarketRow, type PackRow, type ProductRow } from '../db/products';
import { decisionOn } from '../db/reasons';
import type { CopyState } from '../db/schema';
import { withActor, type Trx } from '../db/with-actor';
import { draftContent } from './copy-content';
import { judge, standingOf, WORDS } from './copy-standing';
import { readProduct } from './readings';

export interface LabelPage {
	readonly product: ProductRow;
	readonly packs: readonly PackRow[];
	readonly markets: readonly string[];
	readonly packId: string;
	readonly market: string;
	/** All copies of this pack and market, the newest first. */
	readonly history: readonly CopyHead[];
	readonly copy: CopyView | null;
	readonly list: ListStanding;
}

/** Which copy a page opens with: the one that still has a step before it, else what is printed from. */
const ORDER: readonly CopyState[] = [
	'draft',
	'inReview',
	'approvedByLaboratory',
	'approvedByClient',
	'inUse',
	'superseded',
	'sentBack'
];

/** The label page of a product: one pack, one market, one copy with every element's reasons. */
export function readLabelPage(actor: Actor, slug: string, query: LabelQuery): Promise<LabelPage> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const packs = await packsOf(trx, product.id);
		const markets = await marketsOf(trx, product.id);
		const copies = await copiesOf(trx, product.id);
		const asked = copies.find(({ id }) => id === query.copy);
		const pack = packs.find(({ id }) => id === (asked?.packId ?? query.pack)) ?? packs[0];
		const place = markets.find(({ market }) => market === (asked?.market ?? query.market)) ?? markets[0];
		const list = standingOf(await readProduct(trx, product, today()), await isBeingRechecked(trx, product));
		const history = copies.filter((copy) => copy.packId === pack?.id && copy.market === place?.market);
		const row = asked ?? [...history].sort((a, b) => ORDER.indexOf(a.state) - ORDER.indexOf(b.state))[0];
		return {
			product,
			packs,
			markets: markets.map(({ market }) => market),
			packId: pack?.id ?? '',
			market: place?.market ?? '',
			history: history.map(headOf),
			copy: row && pack && place ? await copyView(trx, row, { product, pack, place, list, history }) : null,
			list
		};
	});
}

/** True while what the product rests on moved and its list has not been read again since. */
async function isBeingRechecked(trx: Trx, product: ProductRow): Promise<boolean> {
	const row = await trx
		.selectFrom('projection')
		.select('inputs_rev')
		.where('product_id', '=', product.id)
		.where('kind', '=', 'list')
		.executeTakeFirst();
	return !row || BigInt(row.inputs_rev) < BigInt(product.inputsRev);
}

interface Around {
	readonly product: ProductRow;
	readonly pack: PackRow;
	readonly place: MarketRow;
	readonly list: ListStanding;
	readonly history: readonly CopyRow[];
}

async function copyView(trx: Trx, row: CopyRow, around: Around): Promise<CopyView> {
	const approvals = await approvalsOf(trx, [row.id]);
	const effects = await effectsOf(trx, [row.id]);
	const listNow = around.list.kind === 'list' ? around.list.text : null;
	const shown = row.state === 'draft' ? { ...row.content, ingredients: listNow ?? '' } : row.content;
	const inUse = around.history.find(({ state, id }) => state === 'inUse' && id !== row.id);
	return {
		...headOf(row),
		rev: row.rev,
		content: row.content,
		elements: elementViews(shown, draftContent(around.product, around.pack, around.place, null)),
		judgement: judge(row.content, around.list),
		listNow,
		basis: row.basis,
		why: row.why,
		approvals: approvals.get(row.id) ?? [],
		effects: effects.get(row.id) ?? [],
		decision: await latestDecision(trx, row),
		replacesInUse: inUse ? { number: inUse.number, firstBatch: inUse.firstBatch } : null
	};
}

const DECISIONS: Readonly<Record<CopyState, string>> = {
	draft: 'copy-begun',
	inReview: 'copy-submitted',
	sentBack: 'copy-sent-back',
	approvedByLaboratory: 'copy-approved-by-laboratory',
	approvedByClient: 'copy-approved-by-client',
	inUse: 'copy-in-use',
	superseded: 'copy-superseded'
};

/** A draft's last word is its last save; it was begun when nobody has saved yet. */
async function latestDecision(trx: Trx, row: CopyRow) {
	const subject = `label-copy/${row.id}`;
	const saved = row.state === 'draft' ? await decisionOn(trx, 'copy-saved', subject) : null;
	return saved ?? (await decisionOn(trx, DECISIONS[row.state], subject));
}

const KEPT_BY: Readonly<Partial<Record<LabelElement, ElementSource>>> = {
	brand: 'product',
	name: 'product',
	function: 'product',
	nominalContent: 'pack',
	ingredients: 'list',
	responsiblePerson: 'market',
	origin: 'market'
};

/** Words that still are those of product, pack and market come from there; all others were written for this copy. */
function elementViews(content: LabelContent, kept: LabelContent): ElementView[] {
	const original = new Map(copyElements(kept, WORDS).map((row) => [row.element, row.text]));
	return copyElements(content, WORDS).map((row) => ({
		...row,
		source: sourceOf(row, original.get(row.element) ?? null),
		rule: ruleView(row.ruleId)
	}));
}

function sourceOf(row: ElementRow, original: string | null): ElementSource {
	const source = KEPT_BY[row.element] ?? 'copy';
	// The e-mark is the copy's own, the figure beside it the pack's.
	if (source === 'list' || source === 'pack') return source;
	return row.text === original ? source : 'copy';
}

function ruleView(id: string | null): RuleView | null {
	const rule = id === null ? undefined : ruleById(id);
	return id !== null && rule ? { id, citation: rule.citation, title: rule.title, text: rule.text } : null;
}
