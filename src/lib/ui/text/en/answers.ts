import type { AllergenLaw, AnswerStanding, Question } from '$lib/domain/material/questions';
import type { Answer, LimitKind } from '$lib/schemas/material-answers';

const questions: Record<Question, string> = {
	composition: 'Composition',
	allergens: 'Allergens',
	impurities: 'Impurities',
	heavyMetals: 'Heavy metals',
	animalOrigin: 'Animal origin',
	nano: 'Nano',
	cmr: 'Carcinogenic, mutagenic, toxic for reproduction',
	animalTesting: 'Animal testing',
	perfumeLimits: 'Perfume limits'
};
const answer: Record<Answer, string> = {
	complete: 'stated complete',
	absent: 'stated absent',
	present: 'stated, some present',
	withdrawn: 'answer withdrawn'
};
const standing: Record<AnswerStanding, string> = {
	given: 'stated',
	earlier: 'stated for an earlier version or list',
	pastDate: 'stated, past its date',
	notStated: 'not stated'
};
const laws: Record<AllergenLaw, string> = {
	'before-2023-1545': 'the list before Regulation (EU) 2023/1545',
	'2023-1545': 'the list of Regulation (EU) 2023/1545'
};

export const answers = {
	title: 'What the supplier has answered',
	count: (given: number, all: number) => `${given} of ${all} questions`,
	question: 'Question',
	answerHead: 'Answer',
	document: 'Document',
	documentHint: 'Attach it to this material first.',
	dated: 'dated',
	goodUntil: 'good until',
	goodUntilHint: 'Without a day, the document’s own.',
	quantifiedFrom: 'Quantified from',
	quantifiedHint: 'As in 1 ppm.',
	law: 'Against which list',
	remark: 'Remark',
	questions,
	answer,
	standing,
	laws,
	from: (text: string) => `quantified from ${text}`,
	neverAbsent: 'none; never read as absent',
	practice: 'Which questions are asked of which material is common practice, no source.',
	record: 'Record an answer',
	save: 'Record',
	recorded: 'Recorded. Earlier answers stay in the audit.',
	faults: {
		documentMissing: 'Choose the document that says so.',
		lawMissing: 'Say against which list the allergens are stated.',
		beforeDated: 'It would run out before its own date.',
		reasonMissing: 'Say why the answer is withdrawn.'
	}
};

const kinds: Record<LimitKind, string> = {
	perfumeCategory: 'perfume certificate, maximum of a category',
	supplierMaximum: 'supplier’s maximum',
	phWindow: 'pH window',
	heatLimit: 'heat limit',
	shearLimit: 'shear and nozzle limit'
};
const least = 'At least';
const ends: Record<LimitKind, { readonly low: string; readonly high: string }> = {
	perfumeCategory: { low: least, high: 'At most, % of the product' },
	supplierMaximum: { low: least, high: 'At most, % of the product' },
	phWindow: { low: 'pH from', high: 'pH to' },
	heatLimit: { low: least, high: 'At most, °C' },
	shearLimit: { low: 'Nozzle at least, mm', high: 'At most, revolutions a minute' }
};

interface SaidLimit {
	readonly category: string | null;
	readonly low: string | null;
	readonly high: string | null;
}
const said: Record<LimitKind, (limit: SaidLimit) => string> = {
	perfumeCategory: ({ category, high }) => `Category ${category}: at most ${high} % of the product`,
	supplierMaximum: ({ high }) => `At most ${high} % of the product`,
	phWindow: ({ low, high }) => `pH ${low} to ${high}`,
	heatLimit: ({ high }) => `At most ${high} °C`,
	shearLimit: ({ low, high }) => `At most ${high} revolutions a minute, nozzle at least ${low} mm`
};

export const limits = {
	title: 'Limits of use',
	none: 'No document sets a limit.',
	kind: 'Kind',
	kinds,
	category: 'Category',
	ends,
	said: (kind: LimitKind, limit: SaidLimit) => said[kind](limit),
	add: 'Add a limit',
	save: 'Add',
	withdraw: 'Withdraw',
	withdrawOf: (limit: string) => `Withdraw: ${limit}`,
	reason: 'reason',
	reasonOf: (limit: string) => `Reason to withdraw: ${limit}`,
	fault: (why: string, value: string): string => {
		switch (why) {
			case 'empty':
				return 'The figure is missing.';
			case 'upsideDown':
				return 'The window begins above its end.';
			case 'categoryMissing':
				return 'Name the category of the certificate.';
			case 'aboveMost':
				return `“${value}” is more than such a limit can be.`;
			case 'negative':
				return `“${value}” is negative; the least is 0.`;
			default:
				return `“${value}” is no figure.`;
		}
	}
};
