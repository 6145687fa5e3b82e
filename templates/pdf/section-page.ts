import type { Content, TableCell } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { blockContent } from './blocks';
import { claimsContent } from './claims-table';
import { compositionTable } from './composition-table';
import { BLOCK_LIMIT, ROWS, SOFT, TABLE, cell, fitsRows, headCell, lead, weightOf } from './paper';
import { chapterId, chapterLaw, chapterTitle, headingNumber, openWordsOf, type Chapter } from './plan';
import type { NeedPrint, ProductFileData, SectionPrint } from './types';

interface Title {
	readonly id: string;
	readonly number: string;
	readonly words: string;
	/** In the bookmarks, where the heading of a part stands under its part. */
	readonly parentId?: string;
}

/** Number and title; number and words are one text, so that a search finds them as printed. */
export const titleContent = (title: Title): Content => ({
	text: `${title.number}  ${title.words}`,
	id: title.id,
	outline: true,
	outlineText: `${title.number}  ${title.words}`,
	outlineParentId: title.parentId,
	outlineExpanded: title.parentId === undefined,
	fontSize: 15.9,
	bold: true,
	lineHeight: 1,
	margin: [0, 0, 0, 2]
});

/** Above a title: where it belongs on the left, the law on the right. */
const crumb = (left: string, law: string): Content => ({
	columns: [
		{ text: left, width: '*' },
		{ text: law, width: 'auto', alignment: 'right', noWrap: true }
	],
	fontSize: 8.2,
	color: SOFT,
	margin: [0, 0, 0, 2]
});

/** All pages of one numbered chapter. */
export function chapterContent(chapter: Chapter, data: ProductFileData, t: Phrases): Content {
	if (chapter.kind === 'single') {
		const title = { id: chapterId(chapter), number: String(chapter.number), words: chapterTitle(chapter, t) };
		return { stack: [sectionContent(chapter.section, title, t.file.kind, data, t)], pageBreak: 'before' };
	}
	const parent = `${chapter.number}  ${chapterTitle(chapter, t)}`;
	return {
		pageBreak: 'before',
		stack: [
			partOpening(chapter, t),
			...chapter.headings.map((heading, index): Content => {
				const title = {
					id: heading.section,
					number: headingNumber(heading.section),
					words: t.sections[heading.section].title,
					parentId: chapterId(chapter)
				};
				return {
					stack: [sectionContent(heading, title, parent, data, t)],
					...(index === 0 && chapter.part === 'a'
						? { pageBreak: 'before' as const }
						: { margin: [0, 30, 0, 0] as [number, number, number, number] })
				};
			})
		]
	};
}

function partOpening(chapter: Extract<Chapter, { kind: 'part' }>, t: Phrases): Content {
	const rows = chapter.headings.map((heading): TableCell[] => [
		{ text: headingNumber(heading.section), alignment: 'right' },
		{ text: t.sections[heading.section].title, linkToDestination: heading.section },
		{ text: openWordsOf(heading, t) || t.file.standingReady, color: SOFT },
		{ pageReference: heading.section, alignment: 'right' }
	]);
	return {
		stack: [
			crumb(t.file.kind, chapterLaw(chapter, t)),
			titleContent({ id: chapterId(chapter), number: String(chapter.number), words: chapterTitle(chapter, t) }),
			lead(t.file.opening(chapter.headings.length) + (chapter.part === 'b' ? ` ${t.file.partBNote}` : '')),
			{
				fontSize: TABLE,
				table: {
					widths: [12, '*', 140, 26],
					headerRows: 1,
					dontBreakRows: true,
					body: [
						[
							headCell(' '),
							headCell(t.file.heading),
							headCell(t.file.standing),
							headCell(t.file.contentsPage, 'right')
						],
						...rows
					]
				},
				layout: ROWS
			}
		]
	};
}

function sectionContent(
	section: SectionPrint,
	title: Title,
	parent: string,
	data: ProductFileData,
	t: Phrases
): Content {
	const open = section.needs.filter((need) => need.answer === 'missing' || need.answer === 'outOfDate').length;
	const readiness = t.file.readiness[section.readiness];
	const needs = needsTable(section.needs, t);
	const head: Content[] = [
		crumb(parent, t.sections[section.section].law),
		titleContent(title),
		lead(t.sections[section.section].purpose, [0, 2, 0, 3]),
		{ text: typeof readiness === 'string' ? readiness : readiness(open), margin: [0, 0, 0, 7] }
	];
	const together = weightOf(...section.needs.flatMap((need) => [need.item, need.words])) <= BLOCK_LIMIT / 2;
	return {
		stack: [
			{ stack: together ? [...head, ...needs] : head, unbreakable: true },
			...(together ? [] : needs),
			...ownContent(section, data, t),
			...section.blocks.map(blockContent)
		]
	};
}

function ownContent(section: SectionPrint, data: ProductFileData, t: Phrases): Content[] {
	if (section.section === 'a1') return [compositionTable(data.composition, t)];
	if (section.section === 'effect') return [claimsContent(data.claims, t)];
	return [];
}

function needsTable(needs: readonly NeedPrint[], t: Phrases): Content[] {
	if (needs.length === 0) return [];
	const whole = fitsRows(needs.flatMap((need) => [need.item, need.words]));
	return [
		{
			fontSize: TABLE,
			margin: [0, 0, 0, 4],
			table: {
				widths: [150, 78, 60, '*'],
				headerRows: 1,
				keepWithHeaderRows: whole ? 1 : 0,
				dontBreakRows: whole,
				body: [
					[headCell(t.file.need), headCell(t.file.needLaw), headCell(t.file.needAnswer), headCell(t.file.needWords)],
					...needs.map((need) => [
						cell(need.item),
						cell(need.law, { color: SOFT }),
						// Good news is quiet: what is missing stands out by weight, not by colour.
						cell(t.file.answers[need.answer], { bold: need.answer === 'missing' || need.answer === 'outOfDate' }),
						cell(need.words)
					])
				]
			},
			layout: ROWS
		}
	];
}
