import { PRODUCT_WORDS } from '$lib/schemas/product';
import { products } from './products';

export const productDetails = {
	title: 'Product',
	sentence: 'Whose it is, who is responsible for it, its packs, and who assesses it.',
	fields: PRODUCT_WORDS.map((field) => [field, products.fields[field]] as const),
	save: 'Save the product',
	saved: 'The product is saved. Copies that are frozen keep the words they were approved with.',
	packs: 'Packs',
	addPack: 'Add a pack',
	assessors: 'Safety assessors',
	noAssessors: 'Nobody is assigned. An assessor sees a product only when it is assigned to them.',
	assessor: 'Safety assessor',
	assign: 'Assign',
	withdraw: (name: string) => `Withdraw ${name}`,
	marginTitle: 'What takes its words from here',
	marginText:
		'A new draft of the label copy begins with these words; the product file prints them. A copy that is in review or approved is not changed by what is saved here.'
};
