import { describe, expect, test } from 'vitest';
import { casFault } from '../../src/lib/domain/material/identifiers';
import { substanceKey } from '../../src/lib/domain/material/substance-key';
import { decimalOf } from '../../src/lib/domain/quantity/decimal';
import { EU_ALLERGENS } from '../../src/lib/reference';
import { ALLERGEN_ROWS } from '../../src/lib/reference/allergens';
import { notRun, table } from './support/facts';

// Source: Annex III of Regulation (EC) No 1223/2009 as amended by (EU) 2023/1545, Commission export of 31 October 2025
// (../shared/data/allergens_machine.csv). Names before the amendment: fact base, B.3, from memory.
const BEFORE_2023 = [
	'Alpha-Isomethyl Ionone',
	'Amyl Cinnamal',
	'Amylcinnamyl Alcohol',
	'Anise Alcohol',
	'Benzyl Alcohol',
	'Benzyl Benzoate',
	'Benzyl Cinnamate',
	'Benzyl Salicylate',
	'Cinnamal',
	'Cinnamyl Alcohol',
	'Citral',
	'Citronellol',
	'Coumarin',
	'Eugenol',
	'Evernia Furfuracea Extract',
	'Evernia Prunastri Extract',
	'Farnesol',
	'Geraniol',
	'Hexyl Cinnamal',
	'Hydroxycitronellal',
	'Isoeugenol',
	'Limonene',
	'Linalool',
	'Methyl 2-Octynoate'
];
const split = (text: string) =>
	text
		.split(';')
		.map((each) => each.trim())
		.filter(Boolean);

describe('against the published table', () => {
	test('entries, names, members, numbers and thresholds', ({ skip }) => {
		if (notRun) {
			console.log(notRun);
			skip(notRun);
		}
		const published = table('allergens_machine.csv').map((row) => ({
			entry: row.entry,
			labelName: row.label_name,
			members: new Set(split(row.member_inci ?? '').map(substanceKey)),
			cas: new Set(split(row.cas ?? '')),
			leaveOnAbove: decimalOf(row.leave_on_threshold_percent ?? '', 16),
			rinseOffAbove: decimalOf(row.rinse_off_threshold_percent ?? '', 16)
		}));
		const ours = ALLERGEN_ROWS.map((row, at) => ({
			entry: row.entry,
			labelName: row.labelName,
			members: new Set(row.members.map(substanceKey)),
			cas: new Set(row.cas),
			leaveOnAbove: EU_ALLERGENS[at]?.leaveOnAbove,
			rinseOffAbove: EU_ALLERGENS[at]?.rinseOffAbove
		}));
		expect(published).toHaveLength(81);
		expect(ours).toEqual(published);
	});
});

describe('of themselves', () => {
	test('the twenty-four older names bind on every day, all others from 1 August 2026', () => {
		const always = EU_ALLERGENS.filter(({ placedFrom }) => placedFrom === null).map(({ labelName }) => labelName);
		expect(always.sort()).toEqual(BEFORE_2023);
		const days = new Set(EU_ALLERGENS.map(({ placedFrom }) => placedFrom));
		expect(days).toEqual(new Set([null, '2026-08-01']));
	});
	test('every number has its check digit', () => {
		const wrong = ALLERGEN_ROWS.flatMap(({ cas }) => cas).filter((number) => casFault(number) !== null);
		expect(wrong).toEqual([]);
	});
	test('no name leads to two entries', () => {
		const names = EU_ALLERGENS.flatMap(({ members }) => members.map(({ inci }) => substanceKey(inci)));
		expect(new Set(names).size).toBe(names.length);
	});
});
