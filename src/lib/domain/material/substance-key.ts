/**
 * The key under which two spellings of one name meet: case, accents, punctuation and spaces fall away.
 * "Caprylic/Capric Triglyceride" and "CAPRYLIC / CAPRIC TRIGLYCERIDE" share one.
 */
export const substanceKey = (name: string): string =>
	name
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.toLowerCase()
		.replace(/[^\p{L}\p{N}]+/gu, ' ')
		.trim();
