import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { create, type FontFace } from 'fontkit';
import pdfmake from 'pdfmake';
import type { TextOutline } from '../../../../templates/pdf/tools';

/** The three families that documents are set in. `Noto` is the default, `DejaVu` stands in for what Noto lacks. */
export const FAMILIES = ['Noto', 'DejaVu', 'Mono'] as const;
export type Family = (typeof FAMILIES)[number];

type Face = 'normal' | 'bold' | 'italics' | 'bolditalics';

const FILES: Readonly<Record<Family, Readonly<Record<Face, string>>>> = {
	Noto: {
		normal: 'NotoSans_400Regular.ttf',
		bold: 'NotoSans_600SemiBold.ttf',
		italics: 'NotoSans_400Regular_Italic.ttf',
		bolditalics: 'NotoSans_600SemiBold_Italic.ttf'
	},
	DejaVu: {
		normal: 'DejaVuSans.ttf',
		bold: 'DejaVuSans-Bold.ttf',
		italics: 'DejaVuSans-Oblique.ttf',
		bolditalics: 'DejaVuSans-BoldOblique.ttf'
	},
	// Codes are never set bold or italic, so one face answers for all four.
	Mono: {
		normal: 'DejaVuSansMono.ttf',
		bold: 'DejaVuSansMono.ttf',
		italics: 'DejaVuSansMono.ttf',
		bolditalics: 'DejaVuSansMono.ttf'
	}
};

export interface FontShelf {
	/** True when every face of the family has a glyph, so that a run may change weight without losing a character. */
	covers(family: Family, codePoint: number): boolean;
	/** The shape of a text set in semibold, for marks that are drawn and must not disturb the text layer. */
	outline(text: string): TextOutline;
}

const shelves = new Map<string, FontShelf>();

export const defaultFontFolder = () => join(process.cwd(), 'templates', 'fonts');

/**
 * Reads the faces and hands them to pdfmake, which keeps one shared instance per process: a second folder would replace
 * the first, so callers use one folder per process. Network and file access of pdfmake are closed; it sees only the
 * bytes put here.
 */
export function openShelf(folder: string = defaultFontFolder()): FontShelf {
	const open = shelves.get(folder);
	if (open) return open;
	const faces = new Map<string, FontFace>();
	for (const file of new Set(FAMILIES.flatMap((family) => Object.values(FILES[family])))) {
		const bytes = readFileSync(join(folder, file));
		pdfmake.virtualfs.writeFileSync(file, bytes);
		faces.set(file, create(bytes));
	}
	pdfmake.setFonts(
		Object.fromEntries(FAMILIES.map((family) => [family, { ...FILES[family] }])) as Record<Family, Record<Face, string>>
	);
	pdfmake.setUrlAccessPolicy(() => false);
	pdfmake.setLocalAccessPolicy(() => false);
	const shelf = shelfOf(faces);
	shelves.set(folder, shelf);
	return shelf;
}

function shelfOf(faces: ReadonlyMap<string, FontFace>): FontShelf {
	const answers = new Map<string, boolean>();
	const face = (file: string): FontFace => {
		const found = faces.get(file);
		if (!found) throw new Error(`The face ${file} is not on the shelf`);
		return found;
	};
	return {
		covers(family, codePoint) {
			const key = `${family} ${codePoint}`;
			const known = answers.get(key);
			if (known !== undefined) return known;
			const answer = Object.values(FILES[family]).every((file) => face(file).hasGlyphForCodePoint(codePoint));
			answers.set(key, answer);
			return answer;
		},
		outline: (text) => outlineOf(face(FILES.Noto.bold), text)
	};
}

/** Path data with the baseline at y = 0, y growing downwards, 1000 units to the em, as SVG wants it. */
function outlineOf(face: FontFace, text: string): TextOutline {
	const scale = 1000 / face.unitsPerEm;
	const run = face.layout(text);
	let x = 0;
	const parts = run.glyphs.map((glyph, index) => {
		const at = run.positions[index] ?? { xAdvance: 0, xOffset: 0, yOffset: 0 };
		const path = glyph.path.transform(scale, 0, 0, -scale, (x + at.xOffset) * scale, -at.yOffset * scale).toSVG();
		x += at.xAdvance;
		return path;
	});
	return { path: parts.join(''), width: run.advanceWidth * scale };
}
