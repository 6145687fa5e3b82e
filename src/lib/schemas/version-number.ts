import { z } from 'zod';

const numberSchema = z.coerce.number().int().positive().max(1_000_000);

/** The version that an address names; 0, which no version has, when it names none. */
export const versionNumberOf = (text: string): number => numberSchema.catch(0).parse(text);
