import { ingredientList } from '../../../src/lib/domain/ingredients/list';
import type { IngredientList, Market, Stay } from '../../../src/lib/domain/ingredients/types';
import { formatExact } from '../../../src/lib/domain/quantity/decimal';
import type { IsoDate } from '../../../src/lib/domain/quantity/units';
import { composed, substancesOf, type Formulas, type Materials } from '../../../src/lib/domain/testing/formula';
import { ALLERGENS, NAME_BOOK } from '../../../src/lib/reference';

/** Shorthands for materials of one constituent or of several, and for a formula by its lines. */
export const pure = (inci: string) => [{ inci, typical: '100' }];
export const parts = (...all: [string, string][]) => all.map(([inci, typical]) => ({ inci, typical }));
export const formula = (...lines: [string, string][]): Formulas => ({
	F: lines.map(([material, percent]) => ({ material, percent }))
});

export const listOf = (
	materials: Materials,
	formulas: Formulas,
	{
		stay = 'leave-on',
		day = '2026-12-01',
		formula = 'F',
		market = 'EU'
	}: { stay?: Stay; day?: string; formula?: string; market?: Market } = {}
): IngredientList =>
	ingredientList(composed(materials, formulas, formula), {
		market,
		stay,
		batchDay: day as IsoDate,
		substances: substancesOf(materials),
		allergens: ALLERGENS[market],
		names: NAME_BOOK
	});

/** The typical share of a name in %, exact. */
export function shareOf(list: IngredientList, name: string): string | undefined {
	const entry = list.entries.find((each) => each.name === name);
	return entry && formatExact(entry.share.typical, list.shareDecimals);
}

export const namesIn = (list: IngredientList, ...blocks: string[]) =>
	list.entries.filter((entry) => blocks.includes(entry.block)).map((entry) => entry.name);
