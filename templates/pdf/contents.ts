import type { Content, TableCell } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { markOf } from './mark';
import { INK, RULE, SOFT, headCell, note } from './paper';
import {
	COPIES_NUMBER,
	EVIDENCE_NUMBER,
	chapterId,
	chapterLaw,
	chapterOpenWords,
	chapterTitle,
	headingNumber,
	openWordsOf,
	type Chapter
} from './plan';
import type { ProductFileData } from './types';

interface Entry {
	readonly level: 1 | 2;
	readonly number: string;
	readonly title: string;
	readonly law: string;
	readonly open: string;
	readonly id: string;
	/** Law column holds the beginning of a hash. */
	readonly code?: boolean;
}

export const COPIES_ID = 'copies';
export const EVIDENCE_ID = 'evidence';
export const copyId = (index: number) => `copy-${index + 1}`;
export const evidenceId = (index: number) => `evidence-${index + 1}`;

function chapterEntries(chapter: Chapter, t: Phrases): readonly Entry[] {
	const own: Entry = {
		level: 1,
		number: String(chapter.number),
		title: chapterTitle(chapter, t),
		law: chapterLaw(chapter, t),
		open: chapterOpenWords(chapter, t),
		id: chapterId(chapter)
	};
	if (chapter.kind === 'single') return [own];
	const headings = chapter.headings.map((heading): Entry => ({
		level: 2,
		number: '',
		title: `${headingNumber(heading.section)}  ${t.sections[heading.section].title}`,
		law: '',
		open: openWordsOf(heading, t),
		id: heading.section
	}));
	return [own, ...headings];
}

function copyEntries(data: ProductFileData, t: Phrases): readonly Entry[] {
	const own: Entry = {
		level: 1,
		number: String(COPIES_NUMBER),
		title: t.file.copies.title,
		law: t.file.copies.law,
		open: data.copies.length === 0 ? t.file.openShort.notBegun : '',
		id: COPIES_ID
	};
	const copies = data.copies.map((copy, index): Entry => {
		const mark = markOf(copy);
		return {
			level: 2,
			number: '',
			title: t.copy.title(copy.packName, copy.marketName),
			law: '',
			open: mark === null ? '' : t.copy.marks[mark],
			id: copyId(index)
		};
	});
	return [own, ...copies];
}

function evidenceEntries(data: ProductFileData, t: Phrases): readonly Entry[] {
	const own: Entry = {
		level: 1,
		number: String(EVIDENCE_NUMBER),
		title: t.file.evidenceCount(data.evidence.length),
		law: data.evidence.length === 0 ? t.file.evidence.law : t.file.hashShort,
		open: '',
		id: EVIDENCE_ID
	};
	const documents = data.evidence.map((document, index): Entry => ({
		level: 2,
		number: '',
		title: document.title,
		law: `${document.sha256.slice(0, 4)} ${document.sha256.slice(4, 8)}`,
		open: '',
		id: evidenceId(index),
		code: true
	}));
	return [own, ...documents];
}

/** The page of contents. Page numbers are references, filled in by the layout, so they cannot go stale. */
export function contentsPage(data: ProductFileData, chapters: readonly Chapter[], t: Phrases): Content {
	const trial = data.issue.kind === 'trial';
	const entries = [
		...chapters.flatMap((chapter) => chapterEntries(chapter, t)),
		...copyEntries(data, t),
		...evidenceEntries(data, t)
	];
	const head = [
		headCell(' '),
		headCell(t.file.contentsSection),
		headCell(t.file.contentsLaw),
		...(trial ? [headCell(t.file.contentsOpen)] : []),
		headCell(t.file.contentsPage, 'right')
	];
	return {
		stack: [
			{ text: t.file.contents, fontSize: 15.9, bold: true, margin: [0, 0, 0, 4] },
			{
				table: {
					widths: trial ? [12, '*', 92, 108, 26] : [12, '*', 110, 26],
					headerRows: 1,
					dontBreakRows: true,
					body: [head, ...entries.map((entry) => entryRow(entry, trial))]
				},
				layout: layoutOf(entries, head.length - 1)
			},
			...(trial ? [note(t.file.contentsNote)] : [])
		]
	};
}

function entryRow(entry: Entry, trial: boolean): TableCell[] {
	const top = entry.level === 1;
	const color = top ? INK : SOFT;
	const fontSize = top ? 9.07 : 8.5;
	const law = entry.code
		? { font: 'Mono', fontSize: 7.2, margin: [0, 1, 0, 0] as [number, number, number, number] }
		: { fontSize };
	return [
		{ text: entry.number, alignment: 'right', color, fontSize },
		{
			text: entry.title,
			// A heading's title may run into the column of the law, which is empty beside it.
			...(entry.law === '' ? { colSpan: 2 } : {}),
			bold: top,
			color,
			fontSize,
			margin: [top ? 0 : 11, 0, 0, 0],
			linkToDestination: entry.id
		},
		{ text: entry.law, color: SOFT, ...law },
		...(trial ? [{ text: entry.open, color, fontSize }] : []),
		{ pageReference: entry.id, alignment: 'right', color, fontSize }
	];
}

/** A rule above each numbered section and none between its headings. */
function layoutOf(entries: readonly Entry[], last: number) {
	const isTop = (row: number) => entries[row - 1]?.level === 1;
	return {
		hLineWidth: (index: number) => (index === 1 ? 0.75 : isTop(index) ? 0.5 : 0),
		vLineWidth: () => 0,
		hLineColor: (index: number) => (index === 1 ? INK : RULE),
		paddingLeft: (index: number) => (index === 0 ? 0 : 4.5),
		paddingRight: (index: number) => (index === 0 ? 2 : index === last ? 0 : 4.5),
		paddingTop: (row: number) => (isTop(row) ? 4.4 : 1.6),
		paddingBottom: (row: number) => (row === 0 ? 3 : isTop(row) ? 4.4 : 1.6)
	};
}
