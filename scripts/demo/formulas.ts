/** Invented formulas; "rest" is the q.s. line, and a code that is a formula's own is a bulk. */
export interface DemoFormula {
	readonly code: string;
	readonly name: string;
	readonly lines: readonly (readonly [phase: string, code: string, percent: string | 'rest'])[];
}

export const DEMO_FORMULAS: readonly DemoFormula[] = [
	{
		code: 'F-0001',
		name: 'Base lotion',
		lines: [
			['A', 'WATER', 'rest'],
			['A', 'GLY-995', '4.00'],
			['A', 'XT-20', '0.25'],
			['B', 'OL-CT60', '7.00'],
			['B', 'GMS-SE', '3.00'],
			['B', 'OL-KS', '2.00'],
			['C', 'WD-90', '1.00'],
			['C', 'TV-70', '0.30']
		]
	},
	{
		code: 'F-0002',
		name: 'Lotion with oat',
		lines: [
			['A', 'F-0001', 'rest'],
			['B', 'OAT-1', '3.00']
		]
	},
	{
		code: 'F-0003',
		name: 'Lotion with camomile',
		lines: [
			['A', 'F-0001', 'rest'],
			['B', 'CHM-1', '3.00'],
			['B', 'OL-CT60', '4.00']
		]
	},
	{
		code: 'F-0004',
		name: 'Lotion, perfumed',
		lines: [
			['A', 'F-0001', 'rest'],
			['B', 'MR-4417', '0.30']
		]
	},
	{
		code: 'F-0012',
		name: 'Nightfold face cream',
		lines: [
			['A', 'WATER', 'rest'],
			['A', 'GLY-995', '5.00'],
			['A', 'QX-CA1', '5.00'],
			['A', 'NCR-N', '2.00'],
			['A', 'XT-20', '0.30'],
			['B', 'OL-CT60', '8.00'],
			['B', 'BW-GA20', '5.00'],
			['B', 'OL-KS', '5.50'],
			['B', 'SQ-O', '2.60'],
			['C', 'HY-H1', '2.00'],
			['C', 'WD-90', '1.00'],
			['C', 'TV-70', '0.50'],
			['C', 'MR-4417', '0.40'],
			['C', 'CA-50', '0.20']
		]
	},
	{
		code: 'F-0020',
		name: 'Tidewell shampoo',
		lines: [
			['A', 'WATER', 'rest'],
			['A', 'SF-LES70', '14.00'],
			['A', 'SF-CB30', '8.00'],
			['A', 'SALT', '0.90'],
			['A', 'PQ-10', '0.30'],
			['B', 'PN-75', '0.80'],
			['B', 'MR-4417', '0.50'],
			['B', 'BZ-SB', '0.45'],
			['B', 'CA-50', '0.60']
		]
	},
	{
		code: 'F-0031',
		name: 'Pebblewick kids wash',
		lines: [
			['A', 'WATER', 'rest'],
			['A', 'SF-CG50', '16.00'],
			['A', 'SF-CB30', '10.00'],
			['A', 'GLY-995', '3.00'],
			['A', 'XT-20', '0.80'],
			['B', 'CAL-1', '1.00'],
			['B', 'BZ-SB', '0.45'],
			['B', 'BZ-KS', '0.30'],
			['B', 'CA-50', '0.90']
		]
	}
];
