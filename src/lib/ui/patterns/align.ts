const LAST_FRACTION = /[.,](\d+)(?!.*\d[.,]\d)/;

/** How many digits stand behind the decimal sign of the last figure in a text such as "4.35–4.85". */
export function fractionDigits(value: string): number {
	const figures = value.match(/\d+(?:[.,]\d+)?/g);
	return LAST_FRACTION.exec(figures?.at(-1) ?? '')?.[1]?.length ?? 0;
}

/**
 * What to print unseen behind each value, so that the decimal points of a column stand under each other. A whole
 * number also leaves out the width of the sign.
 */
export function padding(values: readonly string[], sign: '.' | ','): string[] {
	const digits = values.map(fractionDigits);
	const most = Math.max(0, ...digits);
	return digits.map((own) => {
		const missing = '0'.repeat(most - own);
		return own === 0 && most > 0 ? `${sign}${missing}` : missing;
	});
}
