import type { AllergenRow } from '../schemas/reference';

/**
 * Fragrance allergens that the list must name: Annex III of Regulation (EC) No 1223/2009 as amended by (EU) 2023/1545,
 * state of the Commission's export of 31 October 2025. Columns: entry, name on the label, whether the entry was already named
 * before (EU) 2023/1545, member names, usual chemical names of members beside them,
 * CAS numbers of the members. Thresholds are the same for all and stand in the loader.
 */
export const ALLERGEN_ROWS: readonly AllergenRow[] = [
	{ entry: '45', labelName: 'Benzyl Alcohol', before2023: true, members: ['Benzyl Alcohol'], cas: ['100-51-6'] },
	{ entry: '46', labelName: '6-Methyl Coumarin', before2023: false, members: ['6-Methyl Coumarin'], cas: ['92-48-8'] },
	{ entry: '67', labelName: 'Amyl Cinnamal', before2023: true, members: ['Amyl Cinnamal'], cas: ['122-40-7'] },
	{ entry: '69', labelName: 'Cinnamyl Alcohol', before2023: true, members: ['Cinnamyl Alcohol'], cas: ['104-54-1'] },
	{
		entry: '70',
		labelName: 'Citral',
		before2023: true,
		members: ['Citral', 'Geranial', 'Neral'],
		cas: ['5392-40-5', '141-27-5', '106-26-3']
	},
	{ entry: '71', labelName: 'Eugenol', before2023: true, members: ['Eugenol'], cas: ['97-53-0'] },
	{
		entry: '72',
		labelName: 'Hydroxycitronellal',
		before2023: true,
		members: ['Hydroxycitronellal'],
		cas: ['107-75-5']
	},
	{
		entry: '73',
		labelName: 'Isoeugenol',
		before2023: true,
		members: ['Isoeugenol'],
		cas: ['97-54-1', '5932-68-3', '5912-86-7']
	},
	{
		entry: '74',
		labelName: 'Amylcinnamyl Alcohol',
		before2023: true,
		members: ['Amylcinnamyl Alcohol'],
		cas: ['101-85-9']
	},
	{ entry: '75', labelName: 'Benzyl Salicylate', before2023: true, members: ['Benzyl Salicylate'], cas: ['118-58-1'] },
	{ entry: '76', labelName: 'Cinnamal', before2023: true, members: ['Cinnamal'], cas: ['104-55-2'] },
	{ entry: '77', labelName: 'Coumarin', before2023: true, members: ['Coumarin'], cas: ['91-64-5'] },
	{ entry: '78', labelName: 'Geraniol', before2023: true, members: ['Geraniol'], cas: ['106-24-1'] },
	{ entry: '80', labelName: 'Anise Alcohol', before2023: true, members: ['Anise Alcohol'], cas: ['105-13-5'] },
	{ entry: '81', labelName: 'Benzyl Cinnamate', before2023: true, members: ['Benzyl Cinnamate'], cas: ['103-41-3'] },
	{ entry: '82', labelName: 'Farnesol', before2023: true, members: ['Farnesol'], cas: ['4602-84-0'] },
	{ entry: '84', labelName: 'Linalool', before2023: true, members: ['Linalool'], cas: ['78-70-6'] },
	{ entry: '85', labelName: 'Benzyl Benzoate', before2023: true, members: ['Benzyl Benzoate'], cas: ['120-51-4'] },
	{
		entry: '86',
		labelName: 'Citronellol',
		before2023: true,
		members: ['Citronellol'],
		cas: ['106-22-9', '26489-01-0', '1117-61-9', '7540-51-4']
	},
	{ entry: '87', labelName: 'Hexyl Cinnamal', before2023: true, members: ['Hexyl Cinnamal'], cas: ['101-86-0'] },
	{
		entry: '88',
		labelName: 'Limonene',
		before2023: true,
		members: ['Limonene'],
		cas: ['138-86-3', '7705-14-8', '5989-27-5', '5989-54-8']
	},
	{
		entry: '89',
		labelName: 'Methyl 2-Octynoate',
		before2023: true,
		members: ['Methyl 2-Octynoate'],
		cas: ['111-12-6']
	},
	{
		entry: '90',
		labelName: 'Alpha-Isomethyl Ionone',
		before2023: true,
		members: ['Alpha-Isomethyl Ionone'],
		cas: ['127-51-5']
	},
	{
		entry: '91',
		labelName: 'Evernia Prunastri Extract',
		before2023: true,
		members: ['Evernia Prunastri Extract'],
		cas: ['90028-68-5']
	},
	{
		entry: '92',
		labelName: 'Evernia Furfuracea Extract',
		before2023: true,
		members: ['Evernia Furfuracea Extract'],
		cas: ['90028-67-4']
	},
	{
		entry: '109',
		labelName: 'Pinus Mugo',
		before2023: false,
		members: ['Pinus Mugo Leaf Oil', 'Pinus Mugo Twig Leaf Extract', 'Pinus Mugo Twig Oil'],
		cas: ['90082-72-7']
	},
	{
		entry: '114',
		labelName: 'Pinus Pumila',
		before2023: false,
		members: ['Pinus Pumila Needle Extract', 'Pinus Pumila Twig Leaf Extract', 'Pinus Pumila Twig Leaf Oil'],
		cas: ['97676-05-6']
	},
	{
		entry: '122',
		labelName: 'Cedrus Atlantica Oil/Extract',
		before2023: false,
		members: [
			'Cedrus Atlantica Bark Extract',
			'Cedrus Atlantica Bark Oil',
			'Cedrus Atlantica Bark Water',
			'Cedrus Atlantica Leaf Extract',
			'Cedrus Atlantica Wood Extract',
			'Cedrus Atlantica Wood Oil'
		],
		cas: ['92201-55-3', '8023-85-6']
	},
	{
		entry: '124',
		labelName: 'Turpentine',
		before2023: false,
		members: ['Turpentine'],
		cas: ['9005-90-7', '8006-64-2', '8052-14-0']
	},
	{ entry: '131', labelName: 'Alpha-Terpinene', before2023: false, members: ['Alpha-Terpinene'], cas: ['99-86-5'] },
	{ entry: '133', labelName: 'Terpinolene', before2023: false, members: ['Terpinolene'], cas: ['586-62-9'] },
	{
		entry: '154',
		labelName: 'Myroxylon Pereirae Oil/Extract',
		before2023: false,
		members: [
			'Myroxylon Balsamum Pereirae Balsam Extract',
			'Myroxylon Balsamum Pereirae Balsam Oil',
			'Myroxylon Pereirae Oil',
			'Myroxylon Pereirae Resin Extract',
			'Myroxylon Pereirae Resin'
		],
		cas: ['8007-00-9']
	},
	{
		entry: '157',
		labelName: 'Rose Ketones',
		before2023: false,
		members: [
			'Alpha-Damascone',
			'cis-Rose Ketone 1',
			'trans-Rose Ketone 1',
			'Rose Ketone 4',
			'Rose Ketone 3',
			'trans-Rose Ketone 3',
			'cis-Rose Ketone 2',
			'trans-Rose Ketone 2'
		],
		alsoKnown: ['Beta-Damascone', 'Delta-Damascone', 'Damascenone'],
		cas: [
			'43052-87-5',
			'23726-94-5',
			'24720-09-0',
			'23696-85-7',
			'57378-68-4',
			'71048-82-3',
			'23726-92-3',
			'23726-91-2'
		]
	},
	{
		entry: '175',
		labelName: '3-Propylidenephthalide',
		before2023: false,
		members: ['3-Propylidenephthalide'],
		cas: ['17369-59-4']
	},
	{
		entry: '196',
		labelName: 'Lippia Citriodora Absolute',
		before2023: false,
		members: ['Lippia Citriodora Absolute'],
		cas: ['8024-12-2', '85116-63-8']
	},
	{
		entry: '324',
		labelName: 'Methyl Salicylate',
		before2023: false,
		members: ['Methyl Salicylate'],
		cas: ['119-36-8']
	},
	{ entry: '327', labelName: 'Acetyl Cedrene', before2023: false, members: ['Acetyl Cedrene'], cas: ['32388-55-9'] },
	{ entry: '328', labelName: 'Amyl Salicylate', before2023: false, members: ['Amyl Salicylate'], cas: ['2050-08-0'] },
	{ entry: '329', labelName: 'Anethole', before2023: false, members: ['Anethole'], cas: ['104-46-1', '4180-23-8'] },
	{ entry: '330', labelName: 'Benzaldehyde', before2023: false, members: ['Benzaldehyde'], cas: ['100-52-7'] },
	{
		entry: '331',
		labelName: 'Camphor',
		before2023: false,
		members: ['Camphor'],
		cas: ['76-22-2', '21368-68-3', '464-49-3', '464-48-2']
	},
	{
		entry: '332',
		labelName: 'Beta-Caryophyllene',
		before2023: false,
		members: ['Beta-Caryophyllene'],
		cas: ['87-44-5']
	},
	{
		entry: '333',
		labelName: 'Carvone',
		before2023: false,
		members: ['Carvone'],
		cas: ['99-49-0', '6485-40-1', '2244-16-8']
	},
	{
		entry: '334',
		labelName: 'Dimethyl Phenethyl Acetate',
		before2023: false,
		members: ['Dimethyl Phenethyl Acetate'],
		cas: ['151-05-3']
	},
	{
		entry: '335',
		labelName: 'Hexadecanolactone',
		before2023: false,
		members: ['Hexadecanolactone'],
		cas: ['109-29-5']
	},
	{
		entry: '336',
		labelName: 'Hexamethylindanopyran',
		before2023: false,
		members: ['Hexamethylindanopyran'],
		cas: ['1222-05-5']
	},
	{ entry: '337', labelName: 'Linalyl Acetate', before2023: false, members: ['Linalyl Acetate'], cas: ['115-95-7'] },
	{
		entry: '338',
		labelName: 'Menthol',
		before2023: false,
		members: ['Menthol'],
		cas: ['89-78-1', '1490-04-6', '2216-51-5', '15356-60-2']
	},
	{
		entry: '339',
		labelName: 'Trimethylcyclopentenyl Methylisopentenol',
		before2023: false,
		members: ['Trimethylcyclopentenyl Methylisopentenol'],
		cas: ['67801-20-1']
	},
	{ entry: '340', labelName: 'Salicylaldehyde', before2023: false, members: ['Salicylaldehyde'], cas: ['90-02-8'] },
	{
		entry: '341',
		labelName: 'Santalol',
		before2023: false,
		members: ['Santalol'],
		cas: ['11031-45-1', '115-71-9', '77-42-9']
	},
	{ entry: '342', labelName: 'Sclareol', before2023: false, members: ['Sclareol'], cas: ['515-03-7'] },
	{
		entry: '343',
		labelName: 'Terpineol',
		before2023: false,
		members: ['Terpineol'],
		cas: ['8000-41-7', '98-55-5', '138-87-4', '586-81-2']
	},
	{
		entry: '344',
		labelName: 'Tetramethyl Acetyloctahydronaphthalenes',
		before2023: false,
		members: ['Tetramethyl Acetyloctahydronaphthalenes'],
		cas: ['54464-57-2', '54464-59-4', '68155-66-8', '68155-67-9']
	},
	{
		entry: '345',
		labelName: 'Trimethylbenzenepropanol',
		before2023: false,
		members: ['Trimethylbenzenepropanol'],
		cas: ['103694-68-4']
	},
	{ entry: '346', labelName: 'Vanillin', before2023: false, members: ['Vanillin'], cas: ['121-33-5'] },
	{
		entry: '347',
		labelName: 'Cananga Odorata Oil/Extract',
		before2023: false,
		members: ['Cananga Odorata Flower Extract', 'Cananga Odorata Flower Oil'],
		cas: ['83863-30-3', '8006-81-3', '68606-83-7', '93686-30-7']
	},
	{
		entry: '348',
		labelName: 'Cinnamomum Cassia Leaf Oil',
		before2023: false,
		members: ['Cinnamomum Cassia Leaf Oil'],
		cas: ['8007-80-5', '84961-46-6']
	},
	{
		entry: '349',
		labelName: 'Cinnamomum Zeylanicum Bark Oil',
		before2023: false,
		members: ['Cinnamomum Zeylanicum Bark Oil'],
		cas: ['8015-91-6', '84649-98-9']
	},
	{
		entry: '350',
		labelName: 'Citrus Aurantium Flower Oil',
		before2023: false,
		members: ['Citrus Aurantium Amara Flower Oil', 'Citrus Aurantium Dulcis Flower Oil'],
		cas: ['72968-50-4', '8028-48-6', '8016-38-4']
	},
	{
		entry: '351',
		labelName: 'Citrus Aurantium Peel Oil',
		before2023: false,
		members: ['Citrus Aurantium Amara Peel Oil', 'Citrus Aurantium Dulcis Peel Oil', 'Citrus Sinensis Peel Oil'],
		cas: ['68916-04-1', '72968-50-4', '97766-30-8', '8028-48-6', '8008-57-9']
	},
	{
		entry: '352',
		labelName: 'Citrus Aurantium Bergamia Peel Oil',
		before2023: false,
		members: ['Citrus Aurantium Bergamia Peel Oil'],
		cas: ['8007-75-8', '89957-91-5', '68648-33-9', '85049-52-1']
	},
	{
		entry: '353',
		labelName: 'Citrus Limon Peel Oil',
		before2023: false,
		members: ['Citrus Limon Peel Oil'],
		cas: ['84929-31-7', '8008-56-8']
	},
	{
		entry: '354',
		labelName: 'Lemongrass Oil',
		before2023: false,
		members: ['Cymbopogon Schoenanthus Oil', 'Cymbopogon Flexuosus Oil', 'Cymbopogon Citratus Leaf Oil'],
		cas: ['8007-02-1', '89998-16-3', '91844-92-7']
	},
	{
		entry: '355',
		labelName: 'Eucalyptus Globulus Oil',
		before2023: false,
		members: ['Eucalyptus Globulus Leaf Oil', 'Eucalyptus Globulus Leaf/Twig Oil'],
		cas: ['97926-40-4', '8000-48-4']
	},
	{
		entry: '356',
		labelName: 'Eugenia Caryophyllus Oil',
		before2023: false,
		members: [
			'Eugenia Caryophyllus Leaf Oil',
			'Eugenia Caryophyllus Flower Oil',
			'Eugenia Caryophyllus Stem Oil',
			'Eugenia Caryophyllus Bud Oil'
		],
		cas: ['8000-34-8', '8015-97-2', '84961-50-2']
	},
	{
		entry: '357',
		labelName: 'Jasmine Oil/Extract',
		before2023: false,
		members: ['Jasminum Grandiflorum Flower Extract', 'Jasminum Officinale Oil', 'Jasminum Officinale Flower Extract'],
		cas: ['84776-64-7', '90045-94-6', '8022-96-6', '8024-43-9']
	},
	{
		entry: '358',
		labelName: 'Juniperus Virginiana Oil',
		before2023: false,
		members: ['Juniperus Virginiana Oil', 'Juniperus Virginiana Wood Oil'],
		cas: ['8000-27-9', '85085-41-2']
	},
	{
		entry: '359',
		labelName: 'Laurus Nobilis Leaf Oil',
		before2023: false,
		members: ['Laurus Nobilis Leaf Oil'],
		cas: ['8002-41-3', '8007-48-5', '84603-73-6']
	},
	{
		entry: '360',
		labelName: 'Lavandula Oil/Extract',
		before2023: false,
		members: [
			'Lavandula Hybrida Oil',
			'Lavandula Hybrida Extract',
			'Lavandula Hybrida Flower Extract',
			'Lavandula Intermedia Flower/Leaf/Stem Extract',
			'Lavandula Intermedia Flower/Leaf/Stem Oil',
			'Lavandula Intermedia Oil',
			'Lavandula Angustifolia Oil',
			'Lavandula Angustifolia Flower/Leaf/Stem Extract'
		],
		cas: ['91722-69-9', '8022-15-9', '93455-96-0', '93455-97-1', '92623-76-2', '84776-65-8', '8000-28-0', '90063-37-9']
	},
	{
		entry: '361',
		labelName: 'Mentha Piperita Oil',
		before2023: false,
		members: ['Mentha Piperita Oil'],
		cas: ['8006-90-4', '84082-70-2']
	},
	{
		entry: '362',
		labelName: 'Mentha Viridis Leaf Oil',
		before2023: false,
		members: ['Mentha Viridis Leaf Oil'],
		cas: ['8008-79-5', '84696-51-5']
	},
	{
		entry: '363',
		labelName: 'Narcissus Extract',
		before2023: false,
		members: [
			'Narcissus Poeticus Extract',
			'Narcissus Pseudonarcissus Flower Extract',
			'Narcissus Jonquilla Extract',
			'Narcissus Tazetta Extract'
		],
		cas: ['90064-26-9', '68917-12-4', '90064-27-0', '90064-25-8']
	},
	{
		entry: '364',
		labelName: 'Pelargonium Graveolens Flower Oil',
		before2023: false,
		members: ['Pelargonium Graveolens Flower Oil'],
		cas: ['90082-51-2', '8000-46-2']
	},
	{
		entry: '365',
		labelName: 'Pogostemon Cablin Oil',
		before2023: false,
		members: ['Pogostemon Cablin Oil'],
		cas: ['8014-09-3', '84238-39-1']
	},
	{
		entry: '366',
		labelName: 'Rose Flower Oil/Extract',
		before2023: false,
		members: [
			'Rosa Damascena Flower Oil',
			'Rosa Damascena Flower Extract',
			'Rosa Alba Flower Oil',
			'Rosa Alba Flower Extract',
			'Rosa Canina Flower Oil',
			'Rosa Centifolia Flower Oil',
			'Rosa Centifolia Flower Extract',
			'Rosa Gallica Flower Oil',
			'Rosa Moschata Flower Oil',
			'Rosa Rugosa Flower Oil'
		],
		cas: ['8007-01-0', '90106-38-0', '93334-48-6', '84696-47-9', '84604-12-6', '84604-13-7', '92347-25-6']
	},
	{
		entry: '367',
		labelName: 'Santalum Album Oil',
		before2023: false,
		members: ['Santalum Album Oil'],
		cas: ['8006-87-9', '84787-70-2']
	},
	{ entry: '368', labelName: 'Eugenyl Acetate', before2023: false, members: ['Eugenyl Acetate'], cas: ['93-28-7'] },
	{ entry: '369', labelName: 'Geranyl Acetate', before2023: false, members: ['Geranyl Acetate'], cas: ['105-87-3'] },
	{
		entry: '370',
		labelName: 'Isoeugenyl Acetate',
		before2023: false,
		members: ['Isoeugenyl Acetate'],
		cas: ['93-29-8']
	},
	{
		entry: '371',
		labelName: 'Pinene',
		before2023: false,
		members: ['Pinene'],
		alsoKnown: ['Alpha-Pinene', 'Beta-Pinene'],
		cas: ['80-56-8', '7785-70-8', '127-91-3', '18172-67-3']
	}
];
