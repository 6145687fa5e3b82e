import { canonicalText } from '../change/canonical';
import { copyElements } from './elements';
import { LABEL_ELEMENTS, type LabelContent, type LabelElement } from './types';
import type { LabelWords } from './words';

/** The text whose hash a copy is approved under; its form may never change for a given `form` of the content. */
export const canonicalCopy = (content: LabelContent): string => canonicalText(content);

/** The list as it stands on the pack, with the word that the law puts before it. */
export const printedList = (content: LabelContent, words: LabelWords): string =>
	`${words.ingredients}: ${content.ingredients}`;

/** Stands around the text; `mark` says why it is not for print. */
export interface PlainHead {
	readonly lines: readonly string[];
	readonly mark: string | null;
}

/** The copy as plain text, one element a paragraph. A mark stands first and last, so that no part taken from it loses it. */
export function plainCopy(content: LabelContent, words: LabelWords, head: PlainHead): string {
	const marked = head.mark === null ? [] : [`*** ${head.mark} ***`];
	const elements = copyElements(content, words).flatMap(({ element, text }) => {
		if (text === null) return [];
		return [element === 'ingredients' ? printedList(content, words) : `${words.elements[element]}:\n${text}`];
	});
	return `${[...marked, head.lines.join('\n'), ...elements, ...marked].join('\n\n')}\n`;
}

export interface ElementJson {
	readonly element: LabelElement;
	readonly text: string;
	readonly requiredBy: string | null;
}

/** The elements that have words, for the JSON form. */
export const elementsJson = (content: LabelContent, words: LabelWords): readonly ElementJson[] =>
	copyElements(content, words).flatMap(({ element, text, ruleId }) =>
		text === null ? [] : [{ element, text, requiredBy: ruleId }]
	);

export interface ElementChange {
	readonly element: LabelElement;
	readonly before: string;
	readonly after: string;
}

/** Elements whose words differ between two copies; an absent element is an empty text. */
export function changedElements(
	before: LabelContent,
	after: LabelContent,
	words: LabelWords
): readonly ElementChange[] {
	const texts = (content: LabelContent) =>
		new Map(copyElements(content, words).map(({ element, text }) => [element, text ?? '']));
	const [old, present] = [texts(before), texts(after)];
	return LABEL_ELEMENTS.flatMap((element) => {
		const [was, is] = [old.get(element) ?? '', present.get(element) ?? ''];
		return was === is ? [] : [{ element, before: was, after: is }];
	});
}
