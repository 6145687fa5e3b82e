/** The drawing of a costmary leaf: an oval with small rounded teeth, its side veins running up into them. */

const LENGTH = 440;
const WIDEST = 92;
const TEETH = 22;
const TOOTH = 0.22;

const fixed = (value: number) => value.toFixed(1);

/** Half the width of the blade, `along` from the tip (0) to the stalk (1). */
const halfWidth = (along: number) => WIDEST * Math.pow(Math.sin(Math.PI * Math.pow(along, 0.62)), 0.72);

function side(sign: 1 | -1): string[] {
	const arcs: string[] = [];
	for (let tooth = 0; tooth < TEETH; tooth++) {
		const from = tooth / TEETH;
		const to = (tooth + 1) / TEETH;
		const bulge = (from + to) / 2;
		const out = halfWidth(bulge) + (LENGTH / TEETH) * TOOTH * 2;
		const x = sign * halfWidth(to);
		arcs.push(
			`C${fixed(sign * Math.max(out, halfWidth(from)))} ${fixed((from + TOOTH / TEETH) * LENGTH)} ` +
				`${fixed(sign * out)} ${fixed((to - TOOTH / TEETH / 2) * LENGTH)} ${fixed(x)} ${fixed(to * LENGTH)}`
		);
	}
	return arcs;
}

/** The edge of both halves, each drawn from the tip. */
export const leafEdges = ([1, -1] as const).map((sign) => `M0 0${side(sign).join('')}Z`);

/** Side veins, left and right by turns. */
export const leafVeins = Array.from({ length: 2 * TEETH - 8 }, (_, index) => {
	const sign = index % 2 ? -1 : 1;
	const along = 0.11 + (index * 0.82) / (2 * TEETH - 8);
	const start = along * LENGTH;
	const end = (along - 0.075) * LENGTH;
	const reach = sign * halfWidth(along - 0.075) * 0.9;
	return `M0 ${fixed(start)}C${fixed(reach * 0.35)} ${fixed(start - 3)} ${fixed(reach * 0.75)} ${fixed(end + 16)} ${fixed(reach)} ${fixed(end)}`;
});

export const leafStalk = `M0 6V${LENGTH}M0 ${LENGTH - 4}c1 44-5 76-14 112`;
