import { z } from 'zod';
import { documentDetailsSchema } from './document';

export const UPLOAD_PURPOSES = ['evidence'] as const;
export type UploadPurpose = (typeof UPLOAD_PURPOSES)[number];

/** Names longer than a file system knows are not names; what is kept of one is cut further by the storage rules. */
const ANNOUNCED_NAME_LIMIT = 1000;

export const uploadBeginSchema = z.object({
	name: z.string().min(1).max(ANNOUNCED_NAME_LIMIT),
	bytes: z.number().int().min(0),
	purpose: z.enum(UPLOAD_PURPOSES)
});
export type UploadBegin = z.infer<typeof uploadBeginSchema>;

export const uploadAddressSchema = z.object({ id: z.uuid() });

export const uploadPartSchema = z.object({ id: z.uuid(), n: z.coerce.number().int().min(1).max(10_000) });

/** Completing may file the document at once; without details the file waits for its form. */
export const uploadCompleteSchema = z.object({ document: documentDetailsSchema.nullish() });
