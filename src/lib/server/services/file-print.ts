import { formatExact, formatFixed } from '$lib/domain/quantity/decimal';
import { compare } from '$lib/domain/quantity/units';
import type { SectionReading } from '$lib/domain/file/readiness';
import { RULE_BOOK_NAME, ruleById } from '$lib/reference';
import { CRITERIA } from '$lib/schemas/claim';
import type {
	ClaimPrint,
	CompositionPrint,
	EvidencePrint,
	NeedPrint,
	ProductFileData,
	SectionPrint
} from '../../../../templates/pdf/types';
import type { Actor } from '../access/actor';
import { config } from '../config';
import { claimsOf } from '../db/claims';
import { copiesOf } from '../db/copies';
import { boundDocuments, type BoundDocument } from '../db/file-facts';
import { marketsOf, packsOf, type ProductRow } from '../db/products';
import { documentTitles, formulaCodes } from '../db/reasons';
import type { Trx } from '../db/with-actor';
import { printedCopy } from './copy-print';
import { day } from './copy-words';
import type { FileReadiness } from './file-readiness';
import { ITEM, openWordsOf, whyOf } from './file-words';
import type { Reading } from './readings';

/** Places after the point in the printed composition; typicals to the nearest, ends of a range outwards. */
const PLACES = 4;
type Read = Extract<Reading, { kind: 'reading' }>;

/** Everything that the product file prints, formatted, so that the same state gives the same data and the same bytes. */
export async function fileData(
	trx: Trx,
	actor: Actor,
	product: ProductRow,
	{ sections, reading }: FileReadiness,
	issue: { readonly number: number; readonly on: string }
): Promise<ProductFileData> {
	const basis = reading.kind === 'nothingReleased' ? null : reading.basis;
	const codes = await formulaCodes(trx, basis ? [basis.formulaVersion.formulaId] : []);
	const packs = await packsOf(trx, product.id);
	const market = (await marketsOf(trx, product.id)).find((each) => each.market === 'EU');
	const copies = (await copiesOf(trx, product.id)).filter(
		({ state }) => state === 'approvedByClient' || state === 'inUse'
	);
	const inUse = copies.find(({ state }) => state === 'inUse');
	const printed = [];
	for (const copy of copies) printed.push((await printedCopy(trx, actor, product.slug, copy.id)).data);
	const packWords = packs.map(({ name, size, unit }) => `${name}, ${size.replace(/\.?0+$/, '')} ${unit}`);
	return {
		language: 'en',
		productName: product.name,
		subtitle: [product.functionText, product.stay, ...packWords].join(', '),
		responsiblePerson: { name: market?.responsibleName ?? '', address: market?.responsibleAddress ?? '' },
		compiledBy: { organisation: config().workspaceName, person: actor.name },
		formula: {
			code: basis ? (codes.get(basis.formulaVersion.formulaId) ?? '') : product.formulaCode,
			version: basis?.formulaVersion.number ?? 0,
			basis: 1,
			released: basis ? day(basis.formulaVersion.releasedAt.toISOString()) : null
		},
		rules: `Reg. (EC) 1223/2009, rule book ${RULE_BOOK_NAME}`,
		inUse: inUse?.firstBatch ? `from batch ${inUse.firstBatch}` : null,
		kept: 'ten years after the last batch is placed, at the address above',
		issue: { kind: 'trial', number: issue.number, date: day(issue.on) },
		sections: sections.map((section) => sectionPrint(section, product)),
		composition: reading.kind === 'reading' ? await compositionPrint(trx, reading) : null,
		claims: (await claimsOf(trx, product.id)).map(claimPrint),
		copies: printed,
		evidence: (await boundDocuments(trx, evidenceIds(sections))).map(evidencePrint)
	};
}

const evidenceIds = (sections: readonly SectionReading[]) => [
	...new Set(sections.flatMap(({ needs }) => needs.flatMap(({ documents }) => documents)))
];

const ANSWER = { present: 'held', missing: 'missing', outOfDate: 'outOfDate', notApplicable: 'notApplicable' } as const;

function sectionPrint(section: SectionReading, product: ProductRow): SectionPrint {
	const needs = section.needs.map((reading): NeedPrint => ({
		item: ITEM[reading.need.key] ?? reading.need.key,
		law: ruleById(reading.need.ruleId)?.citation.replace('Reg. (EC) 1223/2009, ', '') ?? '',
		answer: ANSWER[reading.state],
		words: whyOf(reading)
	}));
	const blocks: SectionPrint['blocks'] =
		section.section === 'description'
			? [
					{
						kind: 'facts',
						rows: [
							{ label: 'Name', value: product.name },
							{ label: 'Brand', value: product.brandName },
							{ label: 'Function', value: product.functionText },
							{ label: 'Client’s code', value: product.clientCode ?? '' }
						]
					}
				]
			: [];
	return { section: section.section, readiness: section.readiness, openWords: openWordsOf(section), needs, blocks };
}

async function compositionPrint(trx: Trx, { composition, substances, basis, loaded }: Read): Promise<CompositionPrint> {
	const materials = [...basis.materials.values()].sort((a, b) => (a.code < b.code ? -1 : 1));
	const placeOf = new Map(materials.map((material, index) => [material.materialId, index]));
	const documentOf = new Map(
		[...loaded.materials.values()].map(({ material, constituents }) => [
			material as string,
			constituents.find(({ source }) => source)?.source?.document
		])
	);
	const titles = await documentTitles(
		trx,
		[...documentOf.values()].flatMap((id) => id ?? [])
	);
	const fixed = (value: bigint, direction: 'up' | 'down' | 'nearest') =>
		formatFixed(value, composition.shareDecimals, PLACES, direction);
	const rows = [...composition.rows].sort((a, b) => compare(b.share.typical, a.share.typical));
	let number = 0;
	return {
		lead: `Formula as added. ${materials.length} materials, ${rows.length} substances. Ranges come from suppliers’ ranges, narrowed by the sum; safety is judged at the high end.`,
		rows: rows.map((row) => {
			const identity = substances.get(row.substance);
			const inside = [...row.roles].every((role) => role === 'ofWhich');
			if (!inside) number += 1;
			return {
				number: inside ? null : number,
				name: `${identity?.inci ?? ''}${row.nano ? ' (nano)' : ''}`,
				cas: (identity?.cas ?? []).join(', '),
				function: inside
					? 'of which'
					: [...row.roles].includes('impurity')
						? 'impurity'
						: row.use === 'other'
							? ''
							: row.use,
				share: fixed(row.share.typical, 'nearest'),
				range: row.share.low === row.share.high ? '' : `${fixed(row.share.low, 'down')}–${fixed(row.share.high, 'up')}`,
				sources: [...new Set(row.contributions.flatMap(({ material }) => placeOf.get(material) ?? []))].sort(
					(a, b) => a - b
				)
			};
		}),
		sum: formatExact(100n * 10n ** BigInt(PLACES), PLACES),
		sources: materials.map((material) => {
			const id = documentOf.get(material.materialId);
			const document = id ? titles.get(id) : undefined;
			const dated = document?.dated ? `, ${day(document.dated)}` : '';
			return {
				name: material.tradeName,
				detail: document ? `${document.title}, ${material.supplier}${dated}` : 'no document'
			};
		}),
		notes: [
			`“Of which” stands inside another substance and is not added. Shares are printed to ${PLACES} decimals; the computation is exact.`
		]
	};
}

const claimPrint = (claim: Awaited<ReturnType<typeof claimsOf>>[number]): ClaimPrint => {
	const answerTo = (criterion: string) =>
		claim.answers.find((answer) => answer.criterion === criterion)?.answer ?? null;
	return {
		wording: claim.wording,
		usedOn: '',
		answers: Object.fromEntries(CRITERIA.map((criterion) => [criterion, answerTo(criterion)])) as ClaimPrint['answers'],
		evidence: claim.evidence.map(({ title }) => title)
	};
};

const evidencePrint = (document: BoundDocument): EvidencePrint => ({
	title: document.title,
	kind: document.kind,
	sha256: document.sha256,
	pages: document.pages,
	dated: document.dated ? day(document.dated) : 'undated',
	note: document.encrypted ? 'encrypted; kept, cannot be bound' : document.broken ? 'broken; kept, cannot be bound' : ''
});
