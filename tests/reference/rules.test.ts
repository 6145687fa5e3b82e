import { describe, expect, test } from 'vitest';
import { MARKET_RULES } from '../../src/lib/domain/ingredients/market';
import { allRules, EU_ALLERGENS, idOf, ruleById } from '../../src/lib/reference';
import { ruleTextSchema } from '../../src/lib/schemas/reference';

// What must be there: Regulation (EC) No 1223/2009, by its own numbering (fact base, A.1, A.3, A.4, B.1, B.3).
const EXPECTED = [
	...['2-1-a', '3', '4', '8', '10', '11', '13', '17', '19-2', '19-5', '20', '33'].map((entry) => `art-${entry}`),
	...['a', 'b', 'c', 'd', 'e', 'f', 'g'].map((item) => `art-19-1-${item}`),
	...Array.from({ length: 10 }, (_, at) => `annex-i-a-${at + 1}`),
	...Array.from({ length: 4 }, (_, at) => `annex-i-b-${at + 1}`),
	'annexes-ii-vi-preamble',
	'annex-iii-84'
];

describe('the rule reference', () => {
	test.each(EXPECTED)('%s', (entry) => expect(ruleById(`eu-1223-2009/${entry}`)).toMatchObject({ entry }));
	test('the six criteria of Regulation (EU) No 655/2013', () => {
		const criteria = allRules().filter(({ act }) => act === 'eu-655-2013');
		expect(criteria.map(({ entry }) => entry)).toEqual([1, 2, 3, 4, 5, 6].map((number) => `criterion-${number}`));
	});
	test('an id names one rule, and every rule is found by its id', () => {
		const ids = allRules().map(idOf);
		expect(new Set(ids).size).toBe(ids.length);
		expect(allRules().every((rule) => ruleById(idOf(rule)) === rule)).toBe(true);
	});
	test('every rule that a list can name is there', () => {
		const named = [
			...Object.values(MARKET_RULES).flatMap(({ orderRule, nameRule }) => [orderRule, nameRule]),
			...EU_ALLERGENS.map(({ ruleId }) => ruleId)
		];
		expect(named.filter((id) => ruleById(id) === undefined)).toEqual([]);
	});
	test('an unknown id finds nothing', () => expect(ruleById('eu-1223-2009/art-999')).toBeUndefined());
	test('a row without a source is refused', () => {
		const [rule] = allRules();
		expect(ruleTextSchema.safeParse({ ...rule, source: '' }).success).toBe(false);
		expect(ruleTextSchema.safeParse({ ...rule, standing: 'sure' }).success).toBe(false);
	});
});
