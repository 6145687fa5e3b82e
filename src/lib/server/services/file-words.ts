import type { NeedReading, Readiness, SectionReading, Why } from '$lib/domain/file/readiness';

/** Sentences of the printed file that its template does not hold. */
const list = (names: readonly string[]) => names.join(', ');

export const WHY: Readonly<Record<Why['code'], (names: readonly string[]) => string>> = {
	released: () => 'The released formula answers.',
	nothingReleased: () => 'Release the formula.',
	copyApproved: () => 'A label copy approved by the client.',
	copyMissing: () => 'Bring a label copy to the client’s approval.',
	copyOutOfDate: () => 'The approved label copy prints another list than the formula gives now.',
	held: (names) => list(names),
	notFiled: () => 'File the document.',
	expired: (names) => `${list(names)} has run out.`,
	otherFormula: (names) => `${list(names)} was obtained on another formula version.`,
	allMaterials: () => 'One document for every material.',
	materialsMissing: (names) => `No document for: ${list(names)}.`,
	materialsExpired: (names) => `Run out for: ${list(names)}.`,
	claimsSupported: () => 'Every claim is supported.',
	noClaims: () => 'No claim is recorded; record the claims, or say that none is made.',
	claimsNotYet: (names) => `Not yet supported: ${list(names)}.`,
	claimsOutOfDate: (names) => `Evidence no longer fits: ${list(names)}.`,
	notApplicable: (names) => list(names)
};

export const whyOf = ({ why }: NeedReading): string => WHY[why.code](why.names);

export const ITEM: Readonly<Record<string, string>> = {
	'description.formula': 'Released formula',
	'description.copy': 'Label copy',
	'a1.formula': 'Released formula',
	'a1.statements': 'Composition statement of every material',
	'a2.stability': 'Stability report',
	'a2.specification': 'Specification of the finished product',
	'a3.challenge': 'Preservation challenge test',
	'a3.limits': 'Microbial limits',
	'a4.impurities': 'Impurity statement of every material',
	'a4.packaging': 'Statement on the packaging material',
	'a5.use': 'Directions and warnings on the label',
	'a6.exposure': 'Exposure to the product',
	'a7.doses': 'Exposure to the substances',
	'a8.profiles': 'Toxicological profile of every material',
	'a9.effects': 'Record of undesirable effects',
	'a10.information': 'Other information on the product',
	'b1.conclusion': 'Assessor’s conclusion',
	'b2.warnings': 'Assessor’s view of warnings and instructions',
	'b3.reasoning': 'Assessor’s reasoning',
	'b4.qualification': 'Proof of the assessor’s qualification, date and signature',
	'method.method': 'Method of manufacture',
	'practice.statement': 'Statement of good manufacturing practice',
	'effect.claims': 'Claims with their evidence',
	'animalTesting.statements': 'Statement on animal testing of every material'
};

const OPEN: Readonly<Record<Readiness, (open: number) => string>> = {
	notBegun: () => 'not begun',
	incomplete: (open) => `${open} ${open === 1 ? 'item' : 'items'} open`,
	ready: () => '',
	outOfDate: () => 'out of date',
	beingRechecked: () => 'being re-checked'
};

export const openWordsOf = ({ readiness, needs }: SectionReading): string =>
	OPEN[readiness](needs.filter(({ state }) => state === 'missing' || state === 'outOfDate').length);
