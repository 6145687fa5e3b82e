import type { ContentUnit, LabelElement } from './types';

/** Words that stand on the pack, not on the screen: they follow the label's language and not the reader's. */
export interface LabelWords {
	/** In front of the list; Art. 19(1)(g) asks for this word. */
	readonly ingredients: string;
	readonly content: (size: string, unit: ContentUnit, eMark: boolean) => string;
	/** The date itself is printed at filling. */
	readonly bestBefore: string;
	/** Stands for the open jar with its figure. */
	readonly afterOpening: (months: number) => string;
	readonly batch: (place: string) => string;
	readonly origin: (country: string) => string;
	/** Names of the elements in the plain text form. */
	readonly elements: Readonly<Record<LabelElement, string>>;
}

export const LABEL_WORDS: Readonly<Record<'en', LabelWords>> = {
	en: {
		ingredients: 'Ingredients',
		content: (size, unit, eMark) => `${size} ${unit}${eMark ? ' ℮' : ''}`,
		bestBefore: 'Best used before the end of: (month and year, printed at filling)',
		afterOpening: (months) => `Open jar: ${months} M`,
		batch: (place) => `Lot: (${place})`,
		origin: (country) => `Made in ${country}`,
		elements: {
			brand: 'Brand',
			name: 'Name',
			function: 'Function',
			nominalContent: 'Nominal content',
			directions: 'Directions',
			precautions: 'Precautions',
			ingredients: 'Ingredients',
			durability: 'Durability',
			batch: 'Batch',
			responsiblePerson: 'Responsible person',
			origin: 'Country of origin'
		}
	}
};
