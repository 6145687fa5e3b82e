/** A text as a drawn shape: SVG path data with the baseline at y = 0, 1000 units to the em. */
export interface TextOutline {
	readonly path: string;
	/** Advance width in the same units. */
	readonly width: number;
}

/** What a template may ask of the house that prints it; templates themselves open no file and know no font. */
export interface PrintTools {
	outline(text: string): TextOutline;
}
