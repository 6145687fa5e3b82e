export const batch = {
	title: 'Batch sheet',
	sentence: 'Every weighing of one batch, bulks followed down to their materials.',
	size: 'Batch size, g',
	step: 'Step of the balance, g',
	compute: 'Compute',
	pdf: 'PDF',
	lots: 'Correct for the content of the lots',
	lotsHint:
		'Content of the lot in % of the nominal one, from its certificate. A lot of 96 % is weighed 100/96 times; the q.s. line gives way.',
	lotOf: (material: string) => `${material}, lot in %`,
	planned: 'planned, g',
	exact: 'exact, g',
	within: (bulks: string) => `in ${bulks}`,
	faults: {
		potencyWithoutQs: 'A corrected lot needs a q.s. line that gives way; this formula has none.',
		potencyAboveQs: 'The lots need more than the q.s. line can give.'
	} as Readonly<Record<string, string>>,
	wrong: (field: string, why: string, size: string, step: string) => {
		if (why === 'notWholeSteps') return `${size} g is no whole number of steps of ${step} g.`;
		if (field === 'size') return `“${size}” is no batch size in g.`;
		if (field === 'step') return `“${step}” is no step of a balance in g.`;
		return 'The content of a lot is a number above 0 and at most 200 %.';
	},
	marginTitle: 'How it is rounded',
	marginText:
		'Each weighing is rounded to the step of the balance. The q.s. line takes what the others round away, so that the amounts sum to the batch; without one, the largest remainders are rounded up.'
};
