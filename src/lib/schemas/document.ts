import { z } from 'zod';

/** What a document is evidence of, in the trade's terms. The sections of the product file ask for these kinds. */
export const DOCUMENT_KINDS = [
	'composition',
	'specification',
	'certificateOfAnalysis',
	'safetyDataSheet',
	'allergenStatement',
	'perfumeCertificate',
	'impurityStatement',
	'toxicologicalProfile',
	'animalTestingStatement',
	'packagingStatement',
	'stabilityReport',
	'challengeTest',
	'microbialLimits',
	'manufacturingMethod',
	'goodManufacturingPractice',
	'effectStudy',
	'toleranceTest',
	'undesirableEffects',
	'assessorQualification',
	'other'
] as const;
export type DocumentKind = (typeof DOCUMENT_KINDS)[number];

export const SUBJECT_KINDS = ['material', 'product', 'formula'] as const;
export type SubjectKind = (typeof SUBJECT_KINDS)[number];

export const TITLE_LIMIT = 300;

/** A calendar day; an empty field means that there is none. */
const optionalDay = z
	.union([z.iso.date(), z.literal('')])
	.nullish()
	.transform((day) => day || null);

export const subjectSchema = z.object({
	kind: z.enum(SUBJECT_KINDS),
	id: z.uuid(),
	/** The need of the product file that it answers, where it was attached to one. */
	need: z.string().trim().min(1).max(80).nullish(),
	/** The version of the formula that a test report was made on. */
	formulaVersionId: z.uuid().nullish()
});
export type DocumentSubject = z.infer<typeof subjectSchema>;

export const documentDetailsSchema = z
	.object({
		kind: z.enum(DOCUMENT_KINDS),
		title: z.string().trim().min(1).max(TITLE_LIMIT),
		dated: optionalDay,
		expires: optionalDay,
		supersedes: z.uuid().nullish(),
		subjects: z.array(subjectSchema).max(50).default([])
	})
	.refine(({ dated, expires }) => dated === null || expires === null || expires >= dated, {
		path: ['expires'],
		message: 'expires before its own date'
	});
export type DocumentDetails = z.infer<typeof documentDetailsSchema>;

/** One document may be sent to so many at a time. */
const MOST_ADDRESSES = 200;
export const attachSchema = z.object({
	kind: z.enum(SUBJECT_KINDS),
	/** Codes or slugs, with spaces, commas or line ends between them. */
	address: z
		.string()
		.max(20_000)
		.transform((text) => text.split(/[\s,;]+/).filter((each) => each !== ''))
		.pipe(z.array(z.string().max(80)).min(1).max(MOST_ADDRESSES))
});

/** What the list of documents may be narrowed to; anything else shows all. */
export const documentFilterSchema = z.object({
	kind: z.enum(DOCUMENT_KINDS).or(z.literal('')).catch(''),
	show: z.enum(['all', 'expiring']).catch('all')
});

/** The page that a figure stands on, as a link carries it. */
export const pageQuerySchema = z.coerce.number().int().min(1).max(100_000).nullable().catch(null);

export const fileAddressSchema = z.object({ id: z.uuid() });

/** Shown in the browser only when asked for; anything else downloads. */
export const fileQuerySchema = z.object({ as: z.enum(['inline', 'attachment']).catch('attachment') });
