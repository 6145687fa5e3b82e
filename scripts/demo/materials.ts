/** Invented raw materials of invented suppliers; INCI names, CAS numbers and shares are what such materials usually hold. */
export interface DemoPart {
	readonly inci: string;
	readonly cas?: string;
	readonly min?: string;
	readonly typical?: string;
	readonly max?: string;
	readonly use?: 'colourant' | 'uvFilter' | 'preservative';
	readonly role?: 'carryOver' | 'impurity' | 'processingAid';
	readonly ofWhich?: string;
	readonly nano?: true;
}
export interface DemoMaterial {
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly parts: readonly DemoPart[];
}

const whole = (inci: string, cas?: string): readonly DemoPart[] => [{ inci, ...(cas ? { cas } : {}), typical: '100' }];
const row = (inci: string, typical: string, cas?: string): DemoPart => ({ inci, typical, ...(cas ? { cas } : {}) });
const inPerfume = (inci: string, typical: string, cas: string): DemoPart => ({ inci, typical, cas, ofWhich: 'Parfum' });

const SUPPLIERS = {
	quill: 'Quillstone Extracts',
	brack: 'Brackwater Specialties',
	selby: 'Selby Oils',
	thorn: 'Thornby Chemie',
	ostrel: 'Ostrel Actives',
	pargeter: 'Pargeter & Moss',
	tamber: 'Tamber Colours',
	site: 'Wendmoor site'
} as const;

const AQUA = '7732-18-5';
const GLYCERIN = '56-81-5';
const PHENOXY = '122-99-6';

export const DEMO_MATERIALS: readonly DemoMaterial[] = [
	{ code: 'WATER', tradeName: 'Process water', supplier: SUPPLIERS.site, parts: whole('Aqua', AQUA) },
	{
		code: 'GLY-995',
		tradeName: 'Glycerin 99.5',
		supplier: SUPPLIERS.selby,
		parts: [row('Glycerin', '99.5', GLYCERIN), row('Aqua', '0.5', AQUA)]
	},
	{
		code: 'QX-CA1',
		tradeName: 'Quillex Centella 1',
		supplier: SUPPLIERS.quill,
		parts: [row('Propanediol', '60', '504-63-2'), row('Aqua', '39', AQUA), row('Centella Asiatica Extract', '1')]
	},
	{ code: 'NCR-N', tradeName: 'Niacarrow N', supplier: SUPPLIERS.thorn, parts: whole('Niacinamide', '98-92-0') },
	{ code: 'XT-20', tradeName: 'Xanthar T', supplier: SUPPLIERS.thorn, parts: whole('Xanthan Gum', '11138-66-2') },
	{
		code: 'OL-CT60',
		tradeName: 'Oleavant CT 60',
		supplier: SUPPLIERS.selby,
		parts: whole('Caprylic/Capric Triglyceride', '73398-61-5')
	},
	{
		code: 'BW-GA20',
		tradeName: 'Brackmul GA-20',
		supplier: SUPPLIERS.brack,
		parts: [
			{ inci: 'Cetearyl Alcohol', cas: '67762-27-0', min: '78', max: '82' },
			{ inci: 'Cetearyl Glucoside', cas: '246159-33-1', min: '18', max: '22' }
		]
	},
	{
		code: 'OL-KS',
		tradeName: 'Oleavant Karra soft',
		supplier: SUPPLIERS.selby,
		parts: whole('Butyrospermum Parkii Butter', '194043-92-0')
	},
	{ code: 'SQ-O', tradeName: 'Squalvane O', supplier: SUPPLIERS.selby, parts: whole('Squalane', '111-01-3') },
	{
		code: 'CT-1618',
		tradeName: 'Cetarrow 1618',
		supplier: SUPPLIERS.thorn,
		parts: whole('Cetearyl Alcohol', '67762-27-0')
	},
	{
		code: 'HY-H1',
		tradeName: 'Hydrathen H1',
		supplier: SUPPLIERS.ostrel,
		parts: [
			row('Aqua', '98.2', AQUA),
			row('Sodium Hyaluronate', '1', '9067-32-7'),
			{ inci: 'Phenoxyethanol', typical: '0.8', cas: PHENOXY, use: 'preservative', role: 'carryOver' }
		]
	},
	{
		code: 'WD-90',
		tradeName: 'Wardol 90',
		supplier: SUPPLIERS.thorn,
		parts: [
			{ inci: 'Phenoxyethanol', typical: '90', cas: PHENOXY, use: 'preservative' },
			row('Ethylhexylglycerin', '10', '70445-33-9')
		]
	},
	{
		code: 'TV-70',
		tradeName: 'Tocovar 70',
		supplier: SUPPLIERS.quill,
		parts: [row('Tocopherol', '70', '10191-41-0'), row('Helianthus Annuus Seed Oil', '30', '8001-21-6')]
	},
	{
		code: 'MR-4417',
		tradeName: 'Perfume Meadow Rain 4417',
		supplier: SUPPLIERS.pargeter,
		parts: [
			row('Parfum', '100'),
			inPerfume('Linalool', '12', '78-70-6'),
			inPerfume('Limonene', '8', '138-86-3'),
			inPerfume('Linalyl Acetate', '3', '115-95-7'),
			inPerfume('Citronellol', '1.5', '106-22-9'),
			inPerfume('Coumarin', '0.3', '91-64-5'),
			inPerfume('Geraniol', '0.2', '106-24-1')
		]
	},
	{
		code: 'CA-50',
		tradeName: 'Citric acid 50 %',
		supplier: SUPPLIERS.thorn,
		parts: [row('Citric Acid', '50', '77-92-9'), row('Aqua', '50', AQUA)]
	},
	{
		code: 'RV-15',
		tradeName: 'Retivar 15',
		supplier: SUPPLIERS.quill,
		parts: [row('Retinyl Palmitate', '15', '79-81-2'), row('Helianthus Annuus Seed Oil', '85', '8001-21-6')]
	},
	{
		code: 'OP-2208',
		tradeName: 'Orchard Peel 2208',
		supplier: SUPPLIERS.pargeter,
		parts: [
			{ inci: 'PEG-40 Hydrogenated Castor Oil', cas: '61788-85-0', min: '65', max: '80' },
			{ inci: 'Parfum', min: '18', max: '22' },
			{ inci: 'Propanediol', cas: '504-63-2', min: '5', max: '20' },
			{ inci: 'Limonene', cas: '138-86-3', min: '2.6', max: '5', ofWhich: 'Parfum' },
			{ inci: 'Linalool', cas: '78-70-6', min: '0.6', max: '2', ofWhich: 'Parfum' },
			{ inci: '1,4-Dioxane', cas: '123-91-1', max: '0.001', role: 'impurity' }
		]
	},
	{
		code: 'SF-LES70',
		tradeName: 'Sulvane LES 70',
		supplier: SUPPLIERS.brack,
		parts: [
			row('Sodium Laureth Sulfate', '70', '68585-34-2'),
			row('Aqua', '29.999', AQUA),
			{ inci: '1,4-Dioxane', typical: '0.001', cas: '123-91-1', role: 'impurity' }
		]
	},
	{
		code: 'SF-CB30',
		tradeName: 'Betavane CB 30',
		supplier: SUPPLIERS.brack,
		parts: [
			row('Cocamidopropyl Betaine', '30', '61789-40-0'),
			row('Sodium Chloride', '5', '7647-14-5'),
			row('Aqua', '65', AQUA)
		]
	},
	{
		code: 'SF-CG50',
		tradeName: 'Glucavane CG 50',
		supplier: SUPPLIERS.brack,
		parts: [row('Coco-Glucoside', '50', '110615-47-9'), row('Aqua', '50', AQUA)]
	},
	{
		code: 'SALT',
		tradeName: 'Common salt, fine',
		supplier: SUPPLIERS.thorn,
		parts: whole('Sodium Chloride', '7647-14-5')
	},
	{
		code: 'PQ-10',
		tradeName: 'Quatarrow 10',
		supplier: SUPPLIERS.thorn,
		parts: whole('Polyquaternium-10', '68610-92-4')
	},
	{
		code: 'PN-75',
		tradeName: 'Panthavar 75',
		supplier: SUPPLIERS.ostrel,
		parts: [row('Panthenol', '75', '81-13-0'), row('Aqua', '25', AQUA)]
	},
	{
		code: 'BZ-SB',
		tradeName: 'Wardol SB',
		supplier: SUPPLIERS.thorn,
		parts: [{ inci: 'Sodium Benzoate', typical: '100', cas: '532-32-1', use: 'preservative' }]
	},
	{
		code: 'BZ-KS',
		tradeName: 'Wardol KS',
		supplier: SUPPLIERS.thorn,
		parts: [{ inci: 'Potassium Sorbate', typical: '100', cas: '24634-61-5', use: 'preservative' }]
	},
	{
		code: 'OAT-1',
		tradeName: 'Avenwell Oat 1',
		supplier: SUPPLIERS.quill,
		parts: [
			row('Glycerin', '50', GLYCERIN),
			row('Aqua', '48', AQUA),
			row('Avena Sativa Kernel Extract', '2', '84012-26-0')
		]
	},
	{
		code: 'CAL-1',
		tradeName: 'Quillex Calendula 1',
		supplier: SUPPLIERS.quill,
		parts: [
			row('Glycerin', '60', GLYCERIN),
			row('Aqua', '39', AQUA),
			row('Calendula Officinalis Flower Extract', '1', '84776-23-8')
		]
	},
	{
		code: 'CHM-1',
		tradeName: 'Quillex Camomile 1',
		supplier: SUPPLIERS.quill,
		parts: [
			row('Propanediol', '60', '504-63-2'),
			row('Aqua', '39', AQUA),
			row('Chamomilla Recutita Flower Extract', '1', '84082-60-0')
		]
	},
	{
		code: 'ALM-R',
		tradeName: 'Selby Almond refined',
		supplier: SUPPLIERS.selby,
		parts: whole('Prunus Amygdalus Dulcis Oil', '8007-69-0')
	},
	{
		code: 'JOJ-G',
		tradeName: 'Selby Jojoba golden',
		supplier: SUPPLIERS.selby,
		parts: whole('Simmondsia Chinensis Seed Oil', '61789-91-1')
	},
	{ code: 'CRB-E', tradeName: 'Carbarrow E', supplier: SUPPLIERS.thorn, parts: whole('Carbomer', '9003-01-4') },
	{
		code: 'NAOH-10',
		tradeName: 'Sodium hydroxide 10 %',
		supplier: SUPPLIERS.thorn,
		parts: [row('Sodium Hydroxide', '10', '1310-73-2'), row('Aqua', '90', AQUA)]
	},
	{
		code: 'GMS-SE',
		tradeName: 'Brackmul GS',
		supplier: SUPPLIERS.brack,
		parts: [row('Glyceryl Stearate', '90', '31566-31-1'), row('Stearic Acid', '10', '57-11-4')]
	},
	{ code: 'ALL-P', tradeName: 'Allantarrow', supplier: SUPPLIERS.ostrel, parts: whole('Allantoin', '97-59-6') },
	{ code: 'UREA', tradeName: 'Urevar', supplier: SUPPLIERS.ostrel, parts: whole('Urea', '57-13-6') },
	{
		code: 'TD-W',
		tradeName: 'Tamber White W',
		supplier: SUPPLIERS.tamber,
		parts: [
			{ inci: 'CI 77891', typical: '70', cas: '13463-67-7', use: 'colourant' },
			row('Caprylic/Capric Triglyceride', '30', '73398-61-5')
		]
	},
	{
		code: 'TD-R',
		tradeName: 'Tamber Red iron',
		supplier: SUPPLIERS.tamber,
		parts: [{ inci: 'CI 77491', typical: '100', cas: '1309-37-1', use: 'colourant' }]
	},
	{
		code: 'ZN-NF',
		tradeName: 'Ostrel Zinc fine',
		supplier: SUPPLIERS.ostrel,
		parts: [
			{ inci: 'Zinc Oxide', typical: '96', cas: '1314-13-2', use: 'uvFilter', nano: true },
			row('Triethoxycaprylylsilane', '4', '2943-75-1')
		]
	},
	{
		code: 'LAV-F',
		tradeName: 'Lavender water-free 40',
		supplier: SUPPLIERS.pargeter,
		parts: [
			row('Lavandula Angustifolia Oil', '100', '8000-28-0'),
			{ inci: 'Linalool', typical: '32', cas: '78-70-6', ofWhich: 'Lavandula Angustifolia Oil' },
			{ inci: 'Linalyl Acetate', typical: '36', cas: '115-95-7', ofWhich: 'Lavandula Angustifolia Oil' }
		]
	},
	{ code: 'EDTA-2', tradeName: 'Chelarrow 2', supplier: SUPPLIERS.thorn, parts: whole('Disodium EDTA', '139-33-3') }
];
