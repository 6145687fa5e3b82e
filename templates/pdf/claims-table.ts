import type { Content } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { BLOCK_LIMIT, ROWS, SOFT, TABLE, cell, fitsRows, headCell, note, weightOf } from './paper';
import { PRINTED_CRITERIA, type ClaimPrint } from './types';

/** Each claim with its written answer to the six criteria and its documents. */
export function claimsContent(claims: readonly ClaimPrint[], t: Phrases): Content {
	if (claims.length === 0) return { text: t.file.claims.none, margin: [0, 8, 0, 0] };
	return { stack: claims.map((claim) => claimContent(claim, t)) };
}

function claimContent(claim: ClaimPrint, t: Phrases): Content {
	const words = t.file.claims;
	const answers = PRINTED_CRITERIA.map((criterion) => claim.answers[criterion]);
	const evidence = claim.evidence.length === 0 ? words.noEvidence : claim.evidence.join('\n');
	const texts = [...answers.map((answer) => answer ?? words.unanswered), evidence];
	const whole = fitsRows(texts);
	const rows = PRINTED_CRITERIA.map((criterion) => {
		const answer = claim.answers[criterion];
		return [
			cell(words.criteria[criterion]),
			answer === null ? cell(words.unanswered, { italics: true, color: SOFT }) : cell(answer)
		];
	});
	return {
		margin: [0, 14, 0, 0],
		unbreakable: weightOf(claim.wording, claim.usedOn, ...texts) <= BLOCK_LIMIT,
		stack: [
			{ text: `“${claim.wording}”`, bold: true, fontSize: 10.4 },
			note(words.usedOn(claim.usedOn), [0, 1, 0, 4]),
			{
				fontSize: TABLE,
				table: {
					widths: [140, '*'],
					headerRows: 1,
					keepWithHeaderRows: whole ? 1 : 0,
					dontBreakRows: whole,
					body: [
						[headCell(words.criterion), headCell(words.answer)],
						...rows,
						[cell(words.evidence, { bold: true }), cell(evidence)]
					]
				},
				layout: ROWS
			}
		]
	};
}
