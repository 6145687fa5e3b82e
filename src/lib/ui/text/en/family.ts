export const family = {
	title: 'Family',
	heading: (variants: number) => `One base, ${variants} ${variants === 1 ? 'variant' : 'variants'}`,
	sentence: 'What the base and its variants have in common, what each adds, and what each addition dilutes.',
	sentenceDraft: (draft: number) =>
		`Draft ${draft} of the base stands beside what is released; a figure shows only where it would move.`,
	empty: 'No formula takes this one in as a bulk yet. Add it as a line of another formula, and both stand here.',
	by: 'Rows',
	bys: { ingredient: 'By ingredient', material: 'By material' },
	caption: 'Base and variants side by side, % w/w',
	fromBase: 'From the base, diluted by each variant',
	added: 'Added by a variant',
	isBase: 'the base',
	baseShare: (share: string) => `${share} % base`,
	follows: (share: string) => `${share}, follows`,
	pinned: (share: string, version: number) => `${share}, pinned to ${version}`,
	version: (number: number) => `version ${number}`,
	with: (draft: number) => `with ${draft}`,
	diluted: 'Each variant has less of it than the base, by the share of the base in it. A preservative too.',
	addedText: 'A variant brings it in; the base holds none.',
	marginTitle: 'Reading the family',
	marginText: 'Choose a row: what each variant holds of it, and by which share of the base.'
};

export const impact = {
	title: (number: number) => `What releasing ${number} moves`,
	none: 'No product rests on this formula. Nothing outside it moves.',
	variant: (name: string, pinned: number | null) =>
		pinned === null ? `${name} follows and moves with it.` : `${name} is pinned to ${pinned} and stays.`,
	product: (name: string, client: string) => `${name}, ${client}`,
	listMoves: 'The list says something else:',
	listStays: 'The list stays as it is.',
	copy: (number: number | null, moves: boolean) =>
		`Copy ${number ?? 'in review'}: ${moves ? 'says something else, out of date' : 'untouched'}`,
	noCopies: 'No label copy rests on it.',
	confirm: (number: number) => `Release ${number}`,
	cancel: 'Not yet',
	failed: 'What it would move could not be read. Try again.'
};
