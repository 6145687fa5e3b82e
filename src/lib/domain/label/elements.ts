import { parseDecimal } from '../quantity/decimal';
import {
	LABEL_ELEMENTS,
	type CopyFault,
	type CopyJudgement,
	type ElementRow,
	type LabelContent,
	type LabelElement,
	type ListStanding,
	type NominalContent
} from './types';
import type { LabelWords } from './words';

const ACT = 'eu-1223-2009';
const RULE: Readonly<Record<LabelElement, string | null>> = {
	brand: null,
	name: null,
	function: `${ACT}/art-19-1-f`,
	nominalContent: `${ACT}/art-19-1-b`,
	directions: null,
	precautions: `${ACT}/art-19-1-d`,
	ingredients: `${ACT}/art-19-1-g`,
	durability: `${ACT}/art-19-1-c`,
	batch: `${ACT}/art-19-1-e`,
	responsiblePerson: `${ACT}/art-19-1-a`,
	origin: `${ACT}/art-19-1-a`
};

const SIZE_DECIMALS = 3;
const scaled = (amount: bigint) => amount * 10n ** BigInt(SIZE_DECIMALS);
/** Below this a pack names no content (Art. 19(1)(b)), and Directive 76/211/EEC has no mark for it. */
const SMALLEST = scaled(5n);
/** Directive 76/211/EEC ends at 10 kg and 10 l. */
const LARGEST_MARKED = scaled(10_000n);

/** The size in thousandths of its unit; null where it is no decimal of at most three places. */
function sizeOf(content: NominalContent): bigint | null {
	const parsed = parseDecimal(content.size, { decimals: SIZE_DECIMALS });
	return parsed.ok ? parsed.value : null;
}

const textOrNull = (text: string) => (text.trim() === '' ? null : text);

function durabilityText(content: LabelContent, words: LabelWords): string | null {
	const { durability } = content;
	if (durability === null || durability.kind === 'notNeeded') return null;
	return durability.kind === 'bestBefore' ? words.bestBefore : words.afterOpening(durability.months);
}

function responsibleText({ responsible }: LabelContent): string | null {
	const complete = responsible.name.trim() !== '' && responsible.address.trim() !== '';
	return complete ? `${responsible.name}, ${responsible.address}` : null;
}

function textOf(element: LabelElement, content: LabelContent, words: LabelWords): string | null {
	switch (element) {
		case 'nominalContent': {
			const { size, unit, eMark } = content.content;
			return sizeOf(content.content) === null ? null : words.content(size, unit, eMark);
		}
		case 'durability':
			return durabilityText(content, words);
		case 'batch':
			return content.batch.trim() === '' ? null : words.batch(content.batch);
		case 'responsiblePerson':
			return responsibleText(content);
		case 'origin':
			return content.imported && content.origin.trim() !== '' ? words.origin(content.origin) : null;
		default:
			return textOrNull(content[element]);
	}
}

function isRequired(element: LabelElement, content: LabelContent): boolean {
	switch (element) {
		case 'nominalContent': {
			const size = sizeOf(content.content);
			return size === null || size >= SMALLEST;
		}
		case 'durability':
			return content.durability?.kind !== 'notNeeded';
		case 'origin':
			return content.imported;
		// The findings of the rule book will say which precautions are prescribed; directions are the house's habit.
		case 'directions':
		case 'precautions':
			return false;
		default:
			return true;
	}
}

/**
 * "What stands where": every element with its words, what asks for it and whether it is missing. Source: Regulation (EC)
 * 1223/2009, Art. 19(1); brand and name are asked for by the house, as no copy can be told from another without them.
 */
export const copyElements = (content: LabelContent, words: LabelWords): readonly ElementRow[] =>
	LABEL_ELEMENTS.map((element) => {
		const text = textOf(element, content, words);
		const required = isRequired(element, content);
		return { element, text, ruleId: RULE[element], required, missing: required && text === null };
	});

function listFaults(list: ListStanding): CopyFault[] {
	if (list.kind !== 'list') return [{ kind: list.kind }];
	return list.weak.map(({ before, after }) => ({ kind: 'orderDependsOnRange', before, after }));
}

function markFaults({ content }: LabelContent): CopyFault[] {
	const size = sizeOf(content);
	if (!content.eMark || size === null || (size >= SMALLEST && size <= LARGEST_MARKED)) return [];
	return [{ kind: 'eMarkOutsideScope', size: content.size, unit: content.unit }];
}

/**
 * What refuses the review and approval of a copy, and what asks for a recorded reason. The list counts as present when it can be
 * made: a draft holds none of its own. Sources: Regulation (EC) 1223/2009, Art. 19(1); Directive 76/211/EEC, Art. 1.
 */
export function copyFaults(content: LabelContent, list: ListStanding, words: LabelWords): CopyJudgement {
	const printed = list.kind === 'list' ? { ...content, ingredients: list.text } : content;
	const missing = copyElements(printed, words)
		.filter((row) => row.missing && (row.element !== 'ingredients' || list.kind === 'list'))
		.map(({ element }): CopyFault => ({ kind: 'missing', element }));
	return {
		faults: [...missing, ...markFaults(content), ...listFaults(list)],
		questions: list.kind === 'list' ? list.questions.map((question) => ({ kind: 'threshold', ...question })) : []
	};
}
