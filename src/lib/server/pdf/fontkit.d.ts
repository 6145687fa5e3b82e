/** The part of fontkit 2 that is used; the package ships no types. */
declare module 'fontkit' {
	export interface GlyphPath {
		transform(a: number, b: number, c: number, d: number, e: number, f: number): GlyphPath;
		toSVG(): string;
	}
	export interface GlyphRun {
		readonly glyphs: readonly { readonly path: GlyphPath }[];
		readonly positions: readonly { readonly xAdvance: number; readonly xOffset: number; readonly yOffset: number }[];
		readonly advanceWidth: number;
	}
	export interface FontFace {
		readonly unitsPerEm: number;
		hasGlyphForCodePoint(codePoint: number): boolean;
		layout(text: string): GlyphRun;
	}
	export function create(bytes: Uint8Array): FontFace;
}
