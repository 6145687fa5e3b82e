export const counter = {
	title: 'Your products',
	sentence: (count: number) =>
		count === 0
			? 'The laboratory has no product of yours here yet.'
			: `${count} ${count === 1 ? 'product' : 'products'}.`,
	approved: 'What is approved?',
	nothingApproved:
		'No label copy is approved yet. The laboratory prepares it; you are asked here when it waits for you.'
};
