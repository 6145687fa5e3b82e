import { copyFaults } from '$lib/domain/label/elements';
import type { CopyJudgement, LabelContent, ListStanding } from '$lib/domain/label/types';
import { LABEL_WORDS } from '$lib/domain/label/words';
import { formatExact } from '$lib/domain/quantity/decimal';
import type { Reading } from './readings';

/** The only language that labels have so far. */
export const WORDS = LABEL_WORDS.en;

/** What a reading of the product lets a copy print. */
export function standingOf(reading: Reading, beingRechecked: boolean): ListStanding {
	if (beingRechecked) return { kind: 'beingRechecked' };
	if (reading.kind === 'nothingReleased') return { kind: 'nothingReleased' };
	if (reading.kind === 'faults') return { kind: 'contradictory' };
	const { list } = reading;
	const text = (value: bigint) => formatExact(value, list.shareDecimals);
	return {
		kind: 'list',
		text: list.text,
		weak: list.weak.map(({ before, after }) => ({ before, after })),
		questions: list.questions.flatMap((question) =>
			question.kind === 'allergen'
				? [
						{
							name: question.name,
							low: text(question.share.low),
							high: text(question.share.high),
							limit: text(question.limit)
						}
					]
				: []
		)
	};
}

export const judge = (content: LabelContent, list: ListStanding): CopyJudgement => copyFaults(content, list, WORDS);
