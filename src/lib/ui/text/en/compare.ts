export const compare = {
	title: 'Compare',
	heading: (a: string, b: string) => `From ${a} to ${b}`,
	sentence: 'Two versions by their lines, by what they come to, and by the list they print.',
	from: 'From',
	to: 'To',
	compare: 'Compare',
	onlyMoved: 'only what moved',
	lines: 'Lines, % w/w',
	ingredients: 'Ingredients, % w/w',
	ingredient: 'Ingredient',
	list: 'EU list',
	same: 'Nothing moved.',
	marginText:
		'Both versions are read with the materials and bulks that answer today, so that only the formula’s own change shows. Allergens are judged for a leave-on product.'
};
