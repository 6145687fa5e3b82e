export type IdentifierFault = { readonly why: 'shape' } | { readonly why: 'checkDigit'; readonly right: string };

const digitsOf = (text: string) => [...text].map((digit) => digit.charCodeAt(0) - 48);

/**
 * CAS Registry Number: two to seven digits, two digits, one check digit.
 * The check digit is Σ position × digit, counted from the right without the check digit, modulo 10 (CAS, "Check digit verification").
 */
export function casFault(text: string): IdentifierFault | null {
	const match = /^(\d{2,7})-(\d{2})-(\d)$/.exec(text);
	if (!match) return { why: 'shape' };
	const right = digitsOf(`${match[1]}${match[2]}`)
		.reverse()
		.reduce((total, digit, index) => total + digit * (index + 1), 0);
	return String(right % 10) === match[3] ? null : { why: 'checkDigit', right: String(right % 10) };
}

/**
 * EC number: three, three and one digit; the last is Σ position × digit over the first six, modulo 11
 * (ECHA guidance on the EC inventory). A sum that gives 10 is never assigned.
 */
export function ecFault(text: string): IdentifierFault | null {
	const match = /^(\d{3})-(\d{3})-(\d)$/.exec(text);
	if (!match) return { why: 'shape' };
	const right = digitsOf(`${match[1]}${match[2]}`).reduce((total, digit, index) => total + digit * (index + 1), 0) % 11;
	return String(right) === match[3] ? null : { why: 'checkDigit', right: right === 10 ? '' : String(right) };
}
