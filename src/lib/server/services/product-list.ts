import type { Contribution } from '$lib/domain/composition/types';
import type { IngredientList, ListEntry, Market } from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { formatRatio } from '$lib/domain/quantity/ratio';
import { PART_DECIMALS, type IsoDate } from '$lib/domain/quantity/units';
import { RULE_BOOK_NAME, ruleById } from '$lib/reference';
import type {
	BasisView,
	DecisionView,
	EntryView,
	ListView,
	Place,
	QuestionView,
	RuleView,
	WeighedView
} from '$lib/schemas/list-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { formulaOfKey } from '../db/basis';
import { productBySlug, type ProductRow } from '../db/products';
import { decisionOn, documentTitles, formulaCodes, type DocumentTitle } from '../db/reasons';
import { withActor, type Trx } from '../db/with-actor';
import { refusalView } from './list-decisions';
import { readProduct, type Basis, type Reading } from './readings';

/** Decimals shown of a turning value that does not end: 0.1 ppb of a material is eight, four are read with ease. */
const TURN_PLACES = 4;

type Read = Extract<Reading, { kind: 'reading' }>;

export interface ProductListView {
	readonly product: ProductRow;
	readonly state: Reading['kind'];
	readonly basis: BasisView | null;
	readonly list: ListView | null;
}

/** A product's list of one market on a batch day, with every reason behind every name. */
export function readProductList(
	actor: Actor,
	slug: string,
	batchDay: IsoDate,
	market: Market = 'EU'
): Promise<ProductListView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const reading = await readProduct(trx, product, batchDay, market);
		if (reading.kind === 'nothingReleased') return { product, state: reading.kind, basis: null, list: null };
		const codes = await formulaCodes(trx, formulaIdsOf(reading.basis));
		const basis = basisView(reading.basis, codes);
		if (reading.kind === 'faults') return { product, state: reading.kind, basis, list: null };
		return { product, state: reading.kind, basis, list: await listView(trx, reading, codes) };
	});
}

export const formulaIdsOf = ({ formulaVersions }: Basis): string[] => [
	...new Set([...formulaVersions.values()].map(({ formulaId }) => formulaId))
];

export function basisView(basis: Basis, codes: ReadonlyMap<string, string>): BasisView {
	return {
		formulaCode: codes.get(basis.formulaVersion.formulaId) ?? '',
		formulaNumber: basis.formulaVersion.number,
		releasedOn: basis.formulaVersion.releasedAt.toISOString().slice(0, 10),
		batchDay: basis.batchDay,
		ruleBook: RULE_BOOK_NAME,
		hash: basis.hash,
		materials: [...basis.materials.values()]
			.map(({ code, tradeName, supplier, number }) => ({ code, name: tradeName, supplier, number }))
			.sort((a, b) => (a.code < b.code ? -1 : 1))
	};
}

async function listView(trx: Trx, reading: Read, codes: ReadonlyMap<string, string>): Promise<ListView> {
	const { list, composition } = reading;
	const sources = new Map(
		[...reading.loaded.materials.values()].flatMap(({ constituents }) =>
			constituents.map((part) => [part.id, part.source])
		)
	);
	const substances = new Map(
		[...reading.loaded.materials.values()].flatMap(({ constituents }) =>
			constituents.map((part) => [part.id, part.substance])
		)
	);
	const documents = await documentTitles(trx, [
		...new Set([...sources.values()].flatMap((source) => source?.document ?? []))
	]);
	const text = (value: bigint) => formatExact(value, list.shareDecimals);
	const weighedView = (of: Contribution): WeighedView => {
		const source = sources.get(of.constituent);
		const material = reading.basis.materials.get(of.material);
		const formula = of.formulas.at(-1) ?? '';
		return {
			material: material?.tradeName ?? '',
			materialId: of.material,
			substanceId: substances.get(of.constituent) ?? '',
			carryOver: of.role === 'carryOver',
			materialCode: material?.code ?? '',
			materialNumber: material?.number ?? 0,
			formulaCode: codes.get(formulaOfKey(formula)) ?? '',
			formulaNumber: reading.basis.formulaVersions.get(formula)?.number ?? 0,
			lineId: of.path.at(-1) ?? '',
			weight: formatExact(of.weight.typical, composition.weightDecimals),
			partLow: formatExact(of.part.low, PART_DECIMALS),
			partTypical: formatExact(of.part.typical, PART_DECIMALS),
			partHigh: formatExact(of.part.high, PART_DECIMALS),
			basis: of.part.basis,
			amount: text(of.share.typical),
			document: source ? documentView(documents.get(source.document), source.page) : null
		};
	};
	const entryView = (entry: ListEntry): EntryView => {
		const weighed = entry.why.flatMap((reason) => (reason.kind === 'contribution' ? weighedView(reason.of) : []));
		return {
			name: entry.name,
			materials: [...new Set(weighed.map((each) => each.material))],
			low: text(entry.share.low),
			typical: text(entry.share.typical),
			high: text(entry.share.high),
			basis: entry.share.basis,
			block: entry.block,
			place: placeOf(entry, list),
			allergen: entry.why.some((reason) => reason.kind === 'rule' && reason.code === 'allergen'),
			weighed,
			rules: rulesOf(entry)
		};
	};
	return {
		market: list.market,
		arranged: reading.arranged,
		refused: list.refused.map((each) => refusalView(each, reading)),
		entries: list.entries.map(entryView),
		text: list.text,
		weak: list.weak.map((pair) => ({
			before: pair.before,
			after: pair.after,
			strength: pair.strength,
			turns: pair.turnsAt && {
				material: reading.basis.materials.get(pair.turnsAt.material)?.tradeName ?? '',
				inci: reading.substances.get(pair.turnsAt.substance)?.inci ?? '',
				percent: formatRatio(pair.turnsAt.at, PART_DECIMALS, TURN_PLACES, 'nearest')
			}
		})),
		leftOut: list.leftOut.map(({ name, reason, share, limit }) => ({
			name,
			reason,
			typical: text(share.typical),
			limit: limit === null ? null : text(limit)
		})),
		questions: list.questions.map((question): QuestionView =>
			question.kind === 'allergen'
				? {
						kind: 'threshold',
						name: question.name,
						low: text(question.share.low),
						high: text(question.share.high),
						limit: text(question.limit)
					}
				: {
						kind: 'colourName',
						name: question.name,
						candidates: question.doubt.kind === 'colourForm' ? question.doubt.candidates : []
					}
		),
		decision: await releaseDecision(trx, reading.basis.formulaVersion.id)
	};
}

const releaseDecision = (trx: Trx, versionId: string): Promise<DecisionView | null> =>
	decisionOn(trx, 'version-released', `formula-version/${versionId}`);

const documentView = (document: DocumentTitle | undefined, page: number | null) =>
	document ? { id: document.id, title: document.title, page, dated: document.dated } : null;

/** The weakest pair that the line is part of decides the word beside it. */
function placeOf(entry: ListEntry, list: IngredientList): Place {
	if (entry.block === 'colourant' || entry.block === 'mayContain') return 'colourant';
	const weak = list.weak.filter((pair) => pair.before === entry.name || pair.after === entry.name);
	if (weak.some((pair) => pair.strength === 'undecided')) return 'undecided';
	if (weak.length > 0) return 'restsOnTypical';
	return entry.block === 'free' ? 'free' : 'certain';
}

function rulesOf(entry: ListEntry): RuleView[] {
	const ids = [...new Set(entry.why.flatMap((reason) => (reason.kind === 'rule' ? reason.ruleId : [])))];
	return ids.flatMap((id) => {
		const rule = ruleById(id);
		return rule ? { id, citation: rule.citation, title: rule.title, text: rule.text } : [];
	});
}
