export const trials = {
	title: 'Trials',
	empty:
		'No trial yet. What was made of these lines belongs here: its pH, viscosity, picture and what you think of it.',
	head: {
		number: 'No',
		madeOn: 'made on',
		ph: 'pH',
		viscosity: 'viscosity, mPa·s',
		verdict: 'Verdict',
		remark: 'Remark',
		act: 'Go on'
	},
	verdicts: { good: 'good', nearly: 'nearly', no: 'no' },
	picture: 'Picture',
	pictureTitle: (name: string) => `Picture of a trial, ${name}`,
	record: 'Record a trial of these lines',
	ofSavedLines: 'The lines as they are saved are kept with it, whatever becomes of the draft.',
	save: 'Record the trial',
	continue: (number: number) => `Go on from ${number}`,
	fault: (field: string, value: string) => {
		switch (field) {
			case 'madeOn':
				return 'The day is missing.';
			case 'ph':
				return `“${value}” is no pH; write a number from 0 to 14 with at most two decimals.`;
			case 'viscosity':
				return `“${value}” is no viscosity; write a number with at most two decimals.`;
			default:
				return 'The remark is longer than 2000 characters.';
		}
	}
};
