export interface Band {
	readonly key: string;
	/** Share in %, as printed; drawn to scale and never reckoned with. */
	readonly share: string;
	/** Its range overlaps a neighbour's. */
	readonly hatched?: boolean;
	readonly focused?: boolean;
	/** Two short lines inside a tall band, as in "66 %" and "water". */
	readonly words?: readonly [string, string];
	/** Below the 1 % line. */
	readonly below?: boolean;
}

export interface DrawnBand {
	readonly band: Band;
	readonly y: number;
	readonly height: number;
	/** Middle of the band, from where its line to the row starts. */
	readonly middle: number;
}

const GAP = 0.6;
const LEAST = 0.5;

/** A picture is the one place where a decimal may become a float: nothing is printed from it. */
export const forDrawing = (decimal: string): number => {
	const value = Number(decimal.replace(',', '.'));
	return Number.isFinite(value) ? Math.max(0, value) : 0;
};

/** Bands to scale in `height` px, in the order of the list; what is thinner than half a pixel is still drawn. */
export function drawBands(bands: readonly Band[], height: number): DrawnBand[] {
	const shares = bands.map((band) => forDrawing(band.share));
	const whole = shares.reduce((sum, share) => sum + share, 0);
	if (whole === 0) return [];
	let y = 0;
	return bands.map((band, index) => {
		const room = ((shares[index] ?? 0) / whole) * height;
		const drawn = { band, y, height: Math.max(LEAST, room - GAP), middle: y + room / 2 };
		y += room;
		return drawn;
	});
}

/** Where the 1 % line leaves the bar: above the first band that lies below it. Null when none does. */
export function lineAt(drawn: readonly DrawnBand[]): number | null {
	return drawn.find(({ band }) => band.below)?.y ?? null;
}

/** Middles of the rows from their height, with one row more for the words of the 1 % line. */
export function rowMiddles(bands: readonly Band[], rowHeight: number): number[] {
	return bands.map((band, index) => (index + (band.below ? 1 : 0) + 0.5) * rowHeight);
}
