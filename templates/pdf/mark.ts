import type { Content } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { A4, MADDER } from './paper';
import type { PrintTools, TextOutline } from './tools';
import type { LabelCopyData } from './types';

export type MarkCode = keyof Phrases['copy']['marks'];

const BY_STATE: Readonly<Record<LabelCopyData['state'], MarkCode | null>> = {
	draft: 'draft',
	inReview: 'inReview',
	sentBack: 'sentBack',
	approvedByLaboratory: 'awaitsClient',
	approvedByClient: null,
	inUse: null,
	superseded: 'superseded'
};

/**
 * Which mark a copy carries, null for none. Only a copy that the client approved or that is in use goes unmarked, and
 * only while what it rests on stands. A superseded copy says so even when it is also out of date.
 */
export function markOf(copy: Pick<LabelCopyData, 'state' | 'outOfDate'>): MarkCode | null {
	const byState = BY_STATE[copy.state];
	return copy.outOfDate !== null && byState === null ? 'outOfDate' : byState;
}

const STRIP = { x: A4.width - 46, y: 45, width: 22, height: A4.height - 90 } as const;
const STRIP_EM = 8.6;
const BEHIND_ANGLE = -52;
/** The mark behind the words runs over this length of the page's diagonal. */
const BEHIND_LENGTH = 760;
const BEHIND_MAX_EM = 86;

/** Three times along the edge, reading downwards, so that a crop of any third still shows it. */
function strip(outline: TextOutline): string {
	const scale = STRIP_EM / 1000;
	const half = (outline.width * scale) / 2;
	const x = STRIP.x + STRIP.width / 2 - STRIP_EM * 0.36;
	const words = [1, 3, 5].map((sixth) => {
		const y = STRIP.y + (STRIP.height * sixth) / 6 - half;
		return `<path transform="translate(${x} ${y}) rotate(90) scale(${scale})" fill="${MADDER}" d="${outline.path}"/>`;
	});
	const { x: left, y: top, width, height } = STRIP;
	const box = `<rect x="${left}" y="${top}" width="${width}" height="${height}" fill="none" stroke="${MADDER}" stroke-width="0.75"/>`;
	return box + words.join('');
}

/** Hollow letters across the page: they stay visible in any crop and never hide a word. */
function behind(outline: TextOutline): string {
	const em = Math.min(BEHIND_MAX_EM, (BEHIND_LENGTH / outline.width) * 1000);
	const scale = em / 1000;
	const turn = `translate(${A4.width / 2} ${A4.height / 2}) rotate(${BEHIND_ANGLE}) scale(${scale})`;
	const centre = `translate(${-outline.width / 2} 360)`;
	return `<g transform="${turn}"><path transform="${centre}" fill="none" stroke="${MADDER}" stroke-opacity="0.3" stroke-width="${1.3 / scale}" d="${outline.path}"/></g>`;
}

/**
 * The mark at the side and behind the words, as shapes and not as text: the text layer keeps its reading order, and
 * head and foot carry the mark in words.
 */
export function markBackground(words: string, tools: PrintTools): () => Content {
	const outline = tools.outline(words);
	const { width, height } = A4;
	const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${behind(outline)}${strip(outline)}</svg>`;
	return () => ({ svg, width, height });
}

export const markWords = (words: string): Content => ({ text: words, color: MADDER, bold: true });
