import type { Composition } from '$lib/domain/composition/types';
import { shadedList } from '$lib/domain/ingredients/list';
import type {
	IngredientList,
	LeftOutReason,
	ListQuestion,
	Market,
	Refusal,
	SubstanceIdentity,
	WeakPair
} from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { formatRatio } from '$lib/domain/quantity/ratio';
import { PART_DECIMALS, type Id, type IsoDate } from '$lib/domain/quantity/units';
import { ALLERGENS, NAME_BOOK, RULE_BOOK_NAME } from '$lib/reference';
import type { ComputeInput } from '$lib/schemas/compute';
import type { ProblemEntry } from '../http/answering';
import { Refused } from '../refused';
import { prepare, type Prepared } from './compute';

/** Decimals of a turning value that does not end: beyond what a supplier can state (0.1 ppb). */
const TURN_PLACES = 4;
const QUESTIONS = ['allergens', 'nano'] as const;
const DEFAULT_MARKETS: readonly Market[] = ['EU'];

type Judged = ComputeInput & Required<Pick<ComputeInput, 'use' | 'batch'>>;

/** The ingredient lists of the markets asked for. @throws Refused 'invalid' without use and batch day, or for an arrangement
 * that does not name what is printed. */
export function computeLists(input: ComputeInput) {
	const judged = requireJudged(input);
	const prepared = prepare(input);
	const assumed = input.complete ? {} : { assumed: ['Every question is judged as answered by what was sent.'] };
	if (prepared.shades.length === 0) return { ruleBook: RULE_BOOK_NAME, lists: {}, faults: prepared.faults, ...assumed };
	const markets = input.markets ?? DEFAULT_MARKETS;
	const lists = Object.fromEntries(markets.map((market) => [market, listFor(market, judged, prepared)]));
	return { ruleBook: RULE_BOOK_NAME, lists, faults: [], ...assumed };
}

function requireJudged(input: ComputeInput): Judged {
	const { use, batch } = input;
	if (use && batch) return { ...input, use, batch };
	const missing: ProblemEntry[] = [];
	if (!use) missing.push({ path: 'use', message: 'A list needs to know whether the product stays on.' });
	if (!batch) missing.push({ path: 'batch.placed', message: 'A list is judged on the day the batch is placed.' });
	throw new Refused('invalid', { errors: missing });
}

function listFor(market: Market, input: Judged, { shades, substances }: Prepared) {
	const compositions = shades.map(({ composition }) => composition);
	const request = {
		market,
		stay: input.use.stay,
		batchDay: input.batch.placed as IsoDate,
		firstSold: (input.batch.firstSold ?? null) as IsoDate | null,
		substances,
		allergens: ALLERGENS[market],
		names: NAME_BOOK
	};
	const arrangement = input.arrangement?.[market];
	const list = shadedList(compositions, arrangement ? { ...request, arrangement } : request);
	if (arrangement) refuseOtherNames(market, arrangement, list);
	const questions = [
		...list.questions.map((question) => questionView(question, list)),
		...notStated(input, compositions)
	];
	return { ...listView(list, substances), questions };
}

/** An arrangement names what is printed, each once: neither more nor less. */
function refuseOtherNames(market: Market, arrangement: readonly string[], list: IngredientList): void {
	const path = `arrangement.${market}`;
	const printed = list.entries.map(({ name }) => name);
	const errors: ProblemEntry[] = [
		...arrangement.flatMap((name, at) => {
			if (!printed.includes(name))
				return [{ path: `${path}.${at}`, value: name, message: 'This name is not printed.' }];
			if (arrangement.indexOf(name) !== at)
				return [{ path: `${path}.${at}`, value: name, message: 'This name stands twice.' }];
			return [];
		}),
		...printed
			.filter((name) => !arrangement.includes(name))
			.map((name) => ({ path, value: name, message: 'This printed name is missing.' }))
	];
	if (errors.length > 0) throw new Refused('invalid', { errors });
}

type Substances = ReadonlyMap<Id<'substance'>, SubstanceIdentity>;

function listView(list: IngredientList, substances: Substances) {
	const text = (value: bigint) => formatExact(value, list.shareDecimals);
	const refused = list.refused.map((refusal) => refusalView(refusal, substances));
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
			turnsAt: turningView(pair, substances),
			ask: pair.ask
		})),
		leftOut: list.leftOut.map(({ name, reason }) => ({ inci: name, reason, sentence: LEFT_OUT[reason] })),
		...(refused.length > 0 ? { refused } : {})
	};
}

const turningView = ({ turnsAt }: WeakPair, substances: Substances) =>
	turnsAt && {
		material: turnsAt.material,
		inci: substances.get(turnsAt.substance)?.inci ?? '',
		percent: formatRatio(turnsAt.at, PART_DECIMALS, TURN_PLACES, 'nearest')
	};

const BECAUSE = {
	weight:
		'Some composition within the suppliers’ ranges has more of the second, in the part that is ordered by weight.',
	colourantLast: 'A colourant stands behind the names that are ordered before it.',
	mayContainLast: 'What only some shades hold stands behind everything else.'
} as const satisfies Record<Refusal['because'], string>;

const refusalView = ({ name, before, because, pair }: Refusal, substances: Substances) => ({
	name,
	before,
	because: BECAUSE[because],
	code: because,
	turnsAt: pair && turningView(pair, substances),
	ask: pair?.ask ?? null
});

const LEFT_OUT = {
	impurity: 'An impurity is no ingredient.',
	processingAid: 'A technical aid that is not left in the product is no ingredient.',
	carryOver: 'A recorded justification says that it has no function in the product.',
	allergenAtOrBelow: 'The allergen does not exceed its threshold.',
	allergenNotYet: 'The allergen need not be named for a batch placed on this day.',
	namedByPerfume: 'It is part of a constituent that is named.'
} as const satisfies Record<LeftOutReason, string>;

function questionView(question: ListQuestion, list: IngredientList) {
	if (question.kind === 'colourName') {
		const { name, doubt, ask } = question;
		const unknown = doubt.kind === 'colourUnknown';
		return {
			code: doubt.kind,
			name,
			candidates: unknown ? [] : doubt.candidates,
			ask,
			sentence: unknown
				? 'No colour additive of this number is listed in this rule book for this market.'
				: 'The salt decides under which listed name the colour stands; the constituent’s name does not tell it.'
		};
	}
	return {
		code: 'threshold',
		name: question.name,
		low: formatExact(question.share.low, list.shareDecimals),
		high: formatExact(question.share.high, list.shareDecimals),
		limit: formatExact(question.limit, list.shareDecimals),
		rule: question.ruleId,
		printed: question.printed,
		ask: question.ask,
		sentence: 'The suppliers’ ranges lie on both sides of the threshold.'
	};
}

/** With stated completeness, what no document answers stands open; not stated never reads as absent. */
function notStated(input: ComputeInput, compositions: readonly Composition[]) {
	const { complete } = input;
	if (!complete) return [];
	const materials = [...new Set(compositions.flatMap(({ weighed }) => weighed.map(({ material }) => material)))];
	return materials.flatMap((material) =>
		QUESTIONS.filter(
			(question) => !complete.some((each) => each.material === material && each.question === question)
		).map((question) => ({ code: 'notStated', material, question, sentence: 'The supplier has not answered this.' }))
	);
}
