import type { Phrases } from '../phrases/index';
import { PRINTED_SECTIONS, type PrintedSection, type ProductFileData, type SectionPrint } from './types';

/** The numbered chapters of the file. Parts A and B hold headings; the others are one section each. */
export type Chapter =
	| { readonly kind: 'single'; readonly number: number; readonly section: SectionPrint }
	| {
			readonly kind: 'part';
			readonly number: number;
			readonly part: 'a' | 'b';
			readonly headings: readonly SectionPrint[];
	  };

export const COPIES_NUMBER = 8;
export const EVIDENCE_NUMBER = 9;

const notBegun = (section: PrintedSection): SectionPrint => ({
	section,
	readiness: 'notBegun',
	openWords: '',
	needs: [],
	blocks: []
});

/** Every section of the law in order; what the data leaves out is printed as not begun, never dropped. */
export function chaptersOf(data: ProductFileData): readonly Chapter[] {
	const given = new Map(data.sections.map((section) => [section.section, section]));
	const of = (section: PrintedSection) => given.get(section) ?? notBegun(section);
	const headings = (part: 'a' | 'b') =>
		PRINTED_SECTIONS.filter((section) => new RegExp(`^${part}\\d+$`).test(section)).map(of);
	return [
		{ kind: 'single', number: 1, section: of('description') },
		{ kind: 'part', number: 2, part: 'a', headings: headings('a') },
		{ kind: 'part', number: 3, part: 'b', headings: headings('b') },
		{ kind: 'single', number: 4, section: of('method') },
		{ kind: 'single', number: 5, section: of('practice') },
		{ kind: 'single', number: 6, section: of('effect') },
		{ kind: 'single', number: 7, section: of('animalTesting') }
	];
}

const isOpen = (section: SectionPrint) => section.readiness !== 'ready';

/** What is open in a section, in a few words; empty when nothing is. */
export const openWordsOf = (section: SectionPrint, t: Phrases) =>
	section.openWords || t.file.openShort[section.readiness];

export function chapterOpenWords(chapter: Chapter, t: Phrases): string {
	if (chapter.kind === 'single') return openWordsOf(chapter.section, t);
	const open = chapter.headings.filter(isOpen).length;
	return open === 0 ? '' : t.file.headingsOpen(open);
}

/** Numbers of the chapters that are not ready, for the sentence on the cover. */
export const openChapters = (chapters: readonly Chapter[]): readonly string[] =>
	chapters
		.filter((chapter) => (chapter.kind === 'single' ? isOpen(chapter.section) : chapter.headings.some(isOpen)))
		.map((chapter) => String(chapter.number));

export const chapterTitle = (chapter: Chapter, t: Phrases) =>
	chapter.kind === 'single' ? t.sections[chapter.section.section].title : t.file.parts[chapter.part];

export const chapterLaw = (chapter: Chapter, t: Phrases) =>
	chapter.kind === 'single' ? t.sections[chapter.section.section].law : t.file.partLaw[chapter.part];

export const chapterId = (chapter: Chapter) =>
	chapter.kind === 'single' ? chapter.section.section : `part-${chapter.part}`;

/** `a10` prints as heading 10. */
export const headingNumber = (section: PrintedSection) => section.replace(/^\D+/, '');
