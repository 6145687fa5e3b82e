import { describe, expect, test } from 'vitest';
import type { IsoDate } from '../quantity/units';
import { answerStanding, questionsFor, type GivenAnswer } from './questions';

const DAY = '2026-12-01' as IsoDate;
const answer = (more: Partial<GivenAnswer>): GivenAnswer => ({
	question: 'nano',
	law: null,
	versionNumber: 2,
	goodUntil: null,
	...more
});

describe('who is asked what', () => {
	test('perfumes about allergens and perfume limits, colourants about metals', () => {
		const plain = questionsFor({ fragrant: false, coloured: false });
		expect(plain).not.toContain('allergens');
		expect(questionsFor({ fragrant: true, coloured: false })).toEqual(
			expect.arrayContaining([...plain, 'allergens', 'perfumeLimits'])
		);
		expect(questionsFor({ fragrant: false, coloured: true })).toContain('heavyMetals');
	});
});
describe('how far an answer carries', () => {
	test.each([
		['nobody answered', null, 1, 'notStated'],
		['good to the last day', answer({ goodUntil: DAY }), 1, 'given'],
		['past its day', answer({ goodUntil: '2026-11-30' }), 1, 'pastDate'],
		['of the same composition', answer({}), 2, 'given'],
		['of an earlier composition', answer({}), 3, 'earlier'],
		[
			'allergens by the list before 2023/1545',
			answer({ question: 'allergens', law: 'before-2023-1545' }),
			1,
			'earlier'
		],
		['allergens without saying by which list', answer({ question: 'allergens' }), 1, 'earlier'],
		['allergens by 2023/1545', answer({ question: 'allergens', law: '2023-1545' }), 1, 'given']
	] as const)('%s', (_why, given, since, standing) => expect(answerStanding(given, since, DAY)).toBe(standing));
});
