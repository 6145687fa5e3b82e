import type { Actor } from '../../src/lib/server/access/actor';
import type { CRITERIA } from '../../src/lib/schemas/claim';
import type { DocumentKind } from '../../src/lib/schemas/document';
import { withActor } from '../../src/lib/server/db/with-actor';
import { addClaim, answerClaim, linkEvidence } from '../../src/lib/server/services/claims';
import { fileDocument, storeBytes } from '../../src/lib/server/services/documents';
import { decideNeed } from '../../src/lib/server/services/file-readiness';
import { readFilePage } from '../../src/lib/server/services/product-files';
import { renderPdf } from '../../src/lib/server/pdf/document';

const SLUG = 'nightfold-cream';

interface Report {
	readonly need: string;
	readonly kind: DocumentKind;
	readonly title: string;
	readonly dated: string;
	readonly expires: string;
	readonly words: string;
}

/** Invented reports; every figure in them is for demonstration only. */
const REPORTS: readonly Report[] = [
	{
		need: 'a2.stability',
		kind: 'stabilityReport',
		title: 'Stability ST-0118',
		dated: '2026-10-19',
		expires: '2029-10-19',
		words: 'Twelve weeks at 5, 25 and 40 °C: appearance, odour, pH and viscosity within the specification.'
	},
	{
		need: 'a2.specification',
		kind: 'specification',
		title: 'Specification Nightfold Cream',
		dated: '2026-10-01',
		expires: '',
		words: 'White cream, pH 5.0 to 5.5, viscosity 20 to 30 Pa·s.'
	},
	{
		need: 'a3.challenge',
		kind: 'challengeTest',
		title: 'Challenge test CT-0931',
		dated: '2026-04-02',
		expires: '2029-04-02',
		words: 'Five organisms over 28 days; the laboratory finds criterion A met.'
	},
	{
		need: 'a3.limits',
		kind: 'microbialLimits',
		title: 'Microbial limits Nightfold Cream',
		dated: '2026-10-01',
		expires: '',
		words: 'At most 1000 cfu per gram; the specified organisms absent in 1 g.'
	},
	{
		need: 'a4.packaging',
		kind: 'packagingStatement',
		title: 'Jar and liner PC-0077',
		dated: '2026-09-08',
		expires: '2029-09-08',
		words: 'Glass jar with a polyethylene liner; statement of the makers.'
	},
	{
		need: 'method.method',
		kind: 'manufacturingMethod',
		title: 'Method of manufacture, Wendmoor',
		dated: '2026-11-02',
		expires: '',
		words: 'Water phase to 75 °C, oil phase to 75 °C, emulsify, cool below 40 °C, add phase C.'
	},
	{
		need: 'practice.statement',
		kind: 'goodManufacturingPractice',
		title: 'Practice statement, Wendmoor',
		dated: '2026-02-04',
		expires: '2029-02-04',
		words: 'Manufacture follows good manufacturing practice.'
	},
	{
		need: 'effect.claims',
		kind: 'effectStudy',
		title: 'Moisturising HY-2211',
		dated: '2026-09-09',
		expires: '2029-09-09',
		words: 'Twenty people, one application, measured at 24 hours against an untreated site.'
	}
];

const ANSWERS: Readonly<Record<(typeof CRITERIA)[number], string>> = {
	legalCompliance: 'Names no authority and no legal minimum; moisturising is a cosmetic function.',
	truthfulness: 'Measured on the product itself, not on an ingredient.',
	evidentialSupport: 'Study HY-2211: measured at 24 hours, twenty people, against an untreated site.',
	honesty: 'The duration is the one measured; one application is stated beside it.',
	fairness: 'Compares with nothing.',
	informedDecision: 'Plain words; the duration and the application are stated.'
};

async function file(actor: Actor, report: Report): Promise<string> {
	const { product, formulaVersionId } = await readFilePage(actor, SLUG);
	const bytes = await renderPdf(
		{
			defaultStyle: { font: 'Noto', fontSize: 10 },
			content: [
				{ text: report.title, fontSize: 18 },
				{ text: `${product.name}, ${report.dated}. Invented for demonstration.`, margin: [0, 6, 0, 12] },
				{ text: report.words }
			]
		},
		{
			creationDate: new Date(`${report.dated}T00:00:00Z`),
			title: report.title,
			author: 'Lindgate Test House',
			subject: product.name
		}
	);
	return withActor(actor, async (trx) => {
		const fileName = `${report.title.toLowerCase().replace(/[^a-z0-9]+/g, '-')}.pdf`;
		const stored = await storeBytes(trx, actor, { bytes, mediaType: 'application/pdf', fileName });
		return fileDocument(trx, actor, stored, {
			kind: report.kind,
			title: report.title,
			dated: report.dated,
			expires: report.expires || null,
			subjects: [{ kind: 'product', id: product.id, need: report.need, formulaVersionId }]
		});
	});
}

/** Evidence and claims of the face cream; what is left out shows what a file looks like on its way. */
export async function seedEvidence(officer: Actor, formulator: Actor): Promise<void> {
	const filed = new Map<string, string>();
	for (const report of REPORTS) filed.set(report.need, await file(formulator, report));
	const wording = 'Moisturises for 24 hours';
	const claimId = await addClaim(officer, SLUG, { wording, kind: 'hydration' });
	await answerClaim(officer, SLUG, { claimId, rev: 1, wording, ...ANSWERS });
	await linkEvidence(officer, SLUG, { claimId, documentId: filed.get('effect.claims') ?? '' });
	await addClaim(officer, SLUG, { wording: 'Skin feels soft overnight', kind: 'perception' });
	await decideNeed(officer, SLUG, {
		need: 'a10.information',
		applicable: false,
		reason: 'No further study and no assessment elsewhere is known.'
	});
}
