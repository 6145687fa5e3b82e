import { compose } from '$lib/domain/composition/compose';
import type { Composition, CompositionFault, CompositionRow } from '$lib/domain/composition/types';
import { ingredientList } from '$lib/domain/ingredients/list';
import { compareNames } from '$lib/domain/ingredients/names';
import type { IngredientList, LeftOutReason, SubstanceIdentity } from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { formatRatio } from '$lib/domain/quantity/ratio';
import { compare, LINE_DECIMALS, PART_DECIMALS, type Id, type IsoDate } from '$lib/domain/quantity/units';
import { EU_ALLERGENS, RULE_BOOK_NAME } from '$lib/reference';
import type { ComputeInput } from '$lib/schemas/compute';
import { Refused } from '../refused';
import { compositionRequestOf, refuseWrongIdentities, substancesOf } from './compute-input';

/** Decimals of a turning value that does not end: beyond what a supplier can state (0.1 ppb). */
const TURN_PLACES = 4;
const QUESTIONS = ['allergens', 'nano'] as const;

interface Prepared {
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
	readonly composition: Composition | null;
	readonly faults: readonly object[];
}

function prepare(input: ComputeInput): Prepared {
	if (!Object.hasOwn(input.formulas, input.formula)) {
		throw new Refused('invalid', {
			errors: [{ path: 'formula', value: input.formula, message: 'There is no formula of this name in the call.' }]
		});
	}
	if (input.shades) throw notTaken('shades');
	if (input.arrangement) throw notTaken('arrangement');
	refuseWrongIdentities(input);
	const substances = substancesOf(input);
	const outcome = compose(compositionRequestOf(input));
	return outcome.ok
		? { substances, composition: outcome.value, faults: [] }
		: { substances, composition: null, faults: outcome.faults.flatMap((fault) => faultView(fault, input)) };
}

const notTaken = (path: string) =>
	new Refused('invalid', { errors: [{ path, message: 'This version of the interface does not take this yet.' }] });

/** What a formula consists of; a contradiction gives no rows and the faults that prevent them. */
export function computeComposition(input: ComputeInput) {
	const { substances, composition, faults } = prepare(input);
	if (!composition) return { rows: [], faults };
	const nameOf = (row: CompositionRow) => substances.get(row.substance)?.inci ?? '';
	const rows = [...composition.rows]
		.sort((a, b) => compare(b.share.typical, a.share.typical) || compareNames(nameOf(a), nameOf(b)))
		.map((row) => rowView(row, nameOf(row), composition));
	return { rows, faults: [] };
}

function rowView(row: CompositionRow, inci: string, composition: Composition) {
	const text = (value: bigint) => formatExact(value, composition.shareDecimals);
	return {
		inci,
		nano: row.nano,
		use: row.use,
		roles: [...row.roles],
		low: text(row.share.low),
		typical: text(row.share.typical),
		high: text(row.share.high),
		basis: row.share.basis,
		contributions: row.contributions.map((contribution) => ({
			path: [...contribution.formulas, contribution.material],
			low: text(contribution.share.low),
			typical: text(contribution.share.typical),
			high: text(contribution.share.high)
		}))
	};
}

/** The ingredient lists of the markets asked for; a market that is not computed yet is named, never left out silently. */
export function computeLists(input: ComputeInput) {
	const missing = [
		...(input.use === undefined
			? [{ path: 'use', message: 'A list needs to know whether the product stays on.' }]
			: []),
		...(input.batch === undefined
			? [{ path: 'batch.placed', message: 'A list is judged on the day the batch is placed.' }]
			: [])
	];
	if (!input.use || !input.batch) throw new Refused('invalid', { errors: missing });
	const { substances, composition, faults } = prepare(input);
	const markets = input.markets ?? ['EU'];
	const assumed = input.complete ? {} : { assumed: ['Every question is judged as answered by what was sent.'] };
	const notComputedYet = markets.filter((market) => market !== 'EU');
	if (!composition || !markets.includes('EU'))
		return { ruleBook: RULE_BOOK_NAME, lists: {}, notComputedYet, faults, ...assumed };
	const list = ingredientList(composition, {
		market: 'EU',
		stay: input.use.stay,
		batchDay: input.batch.placed as IsoDate,
		substances,
		allergens: EU_ALLERGENS
	});
	const questions = [
		...list.questions.map((question) => questionView(question, list)),
		...notStated(input, composition)
	];
	return {
		ruleBook: RULE_BOOK_NAME,
		lists: { EU: { ...listView(list, substances), questions } },
		notComputedYet,
		faults: [],
		...assumed
	};
}

function listView(list: IngredientList, substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>) {
	const text = (value: bigint) => formatExact(value, list.shareDecimals);
	return {
		text: list.text,
		entries: list.entries.map(({ name, share, block }) => ({
			name,
			low: text(share.low),
			typical: text(share.typical),
			high: text(share.high),
			block
		})),
		weak: list.weak.map((pair) => ({
			before: pair.before,
			after: pair.after,
			strength: pair.strength,
			turnsAt: pair.turnsAt && {
				material: pair.turnsAt.material,
				inci: substances.get(pair.turnsAt.substance)?.inci ?? '',
				percent: formatRatio(pair.turnsAt.at, PART_DECIMALS, TURN_PLACES, 'nearest')
			},
			ask: pair.ask
		})),
		leftOut: list.leftOut.map(({ name, reason }) => ({ inci: name, reason, sentence: LEFT_OUT[reason] }))
	};
}

const LEFT_OUT = {
	impurity: 'An impurity is no ingredient.',
	processingAid: 'A technical aid that is not left in the product is no ingredient.',
	allergenAtOrBelow: 'The allergen does not exceed its threshold.',
	allergenNotYet: 'The allergen need not be named for a batch placed on this day.',
	namedByPerfume: 'It is part of a constituent that is named.'
} as const satisfies Record<LeftOutReason, string>;

const questionView = (question: IngredientList['questions'][number], list: IngredientList) => ({
	code: 'threshold',
	name: question.name,
	low: formatExact(question.share.low, list.shareDecimals),
	high: formatExact(question.share.high, list.shareDecimals),
	limit: formatExact(question.limit, list.shareDecimals),
	rule: question.ruleId,
	printed: question.printed,
	ask: question.ask,
	sentence: 'The suppliers’ ranges lie on both sides of the threshold.'
});

/** With stated completeness, what no document answers stands open; not stated never reads as absent. */
function notStated(input: ComputeInput, composition: Composition) {
	const { complete } = input;
	if (!complete) return [];
	return composition.weighed.flatMap(({ material }) =>
		QUESTIONS.filter(
			(question) => !complete.some((each) => each.material === material && each.question === question)
		).map((question) => ({ code: 'notStated', material, question, sentence: 'The supplier has not answered this.' }))
	);
}

function faultView(fault: CompositionFault, input: ComputeInput): object[] {
	switch (fault.kind) {
		case 'material': {
			const { fault: inner, material } = fault;
			const by = 'by' in inner ? { by: formatExact(inner.by, PART_DECIMALS) } : {};
			const at = 'at' in inner ? inner.at : 'parent' in inner ? inner.parent : null;
			const index = at === null ? -1 : Number(at.slice(at.lastIndexOf('/') + 1));
			const inci = input.materials[material]?.constituents[index]?.inci;
			return [{ material, kind: inner.kind, ...by, ...(inci === undefined ? {} : { inci }) }];
		}
		case 'materialMissing':
			return [{ material: fault.material, kind: fault.kind }];
		case 'cycle':
			return [{ formula: fault.path[0], kind: fault.kind, path: fault.path }];
		case 'sumAbove100':
		case 'sumBelow100':
			return [{ formula: fault.formula, kind: fault.kind, by: formatExact(fault.by, LINE_DECIMALS) }];
		default:
			return [{ formula: fault.formula, kind: fault.kind }];
	}
}
