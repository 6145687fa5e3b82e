export interface LeaderEnds {
	/** Right edge and lower edge of the row that has the focus. */
	readonly fromX: number;
	readonly fromY: number;
	/** Where the line runs up or down, just beyond the sheet. */
	readonly turnX: number;
	/** The first node of the trail. */
	readonly toX: number;
	readonly toY: number;
}

const ROUND = 3;

/** The line along the sheet's edge from the row to its reasons, with rounded turns; px of the book. */
export function leaderPath({ fromX, fromY, turnX, toX, toY }: LeaderEnds): string {
	const rise = toY - fromY;
	if (Math.abs(rise) < 2 * ROUND) return `M${fromX} ${fromY}H${toX}`;
	const turn = Math.sign(rise) * ROUND;
	return (
		`M${fromX} ${fromY}H${turnX - ROUND}q${ROUND} 0 ${ROUND} ${turn}` +
		`V${toY - turn}q0 ${turn} ${ROUND} ${turn}H${toX}`
	);
}

const ROW = "tr[aria-current='true'], [data-leader-from='true']";
const NODE = '[data-trail-node]';
const BEYOND = 12;
const GAP = 2;
/** The leaf hangs this far before its node. */
const LEAF_HANG = 20.5;

/** Reads the ends from the page; null when the margin does not stand beside the sheet or one end is missing. */
export function leaderEnds(book: HTMLElement): LeaderEnds | null {
	const sheet = book.querySelector<HTMLElement>('[data-sheet]');
	const margin = book.querySelector<HTMLElement>('[data-margin]');
	const row = sheet?.querySelector<HTMLElement>(ROW);
	const node = margin?.querySelector<HTMLElement>(NODE);
	if (!sheet || !margin || !row || !node) return null;
	const [origin, page, side, line, leaf] = [book, sheet, margin, row, node].map((each) => each.getBoundingClientRect());
	if (!origin || !page || !side || !line || !leaf || side.left < page.right - 1) return null;
	const round = (value: number) => Math.round(value * 2) / 2;
	return {
		fromX: round(Math.min(line.right, page.right) - origin.left),
		fromY: round(line.bottom - origin.top - 0.5),
		turnX: round(page.right - origin.left + BEYOND),
		toX: round(leaf.left - origin.left - LEAF_HANG - GAP),
		toY: round(leaf.top - origin.top + 10)
	};
}
