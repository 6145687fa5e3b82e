import {
	answerStanding,
	questionsFor,
	type AnswerStanding,
	type MaterialTraits,
	type Question
} from '$lib/domain/material/questions';
import { decimalOf, formatExact } from '$lib/domain/quantity/decimal';
import type { IsoDate } from '$lib/domain/quantity/units';
import { LIMIT_DECIMALS, type AnswerInput, type UseLimitInput } from '$lib/schemas/material-answers';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import type { ConstituentRow } from '../db/basis';
import { documentById, documentsOf, insertLink } from '../db/documents';
import {
	insertAnswer,
	insertLimit,
	limitsOf,
	lockLimit,
	standingAnswers,
	withdrawLimit,
	type AnswerRow,
	type LimitRow
} from '../db/material-answers';
import { materialByCode, versionsOfMaterial, type VersionRow } from '../db/materials';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';

export interface AnswerView {
	readonly question: Question;
	readonly standing: AnswerStanding;
	readonly given: AnswerRow | null;
}
export interface Answers {
	readonly answers: readonly AnswerView[];
	/** How many of the questions are answered and still count. */
	readonly given: number;
	readonly limits: readonly LimitRow[];
}

const FRAGRANT = new Set(['parfum', 'aroma', 'fragrance', 'flavor']);

export const traitsOf = (constituents: readonly Pick<ConstituentRow, 'name_key' | 'use'>[]): MaterialTraits => ({
	fragrant: constituents.some(({ name_key: key }) => FRAGRANT.has(key)),
	coloured: constituents.some(({ use }) => use === 'colourant')
});

/** What the supplier has answered about a version, and the limits of use that documents set. */
export async function answersOf(
	trx: Trx,
	materialId: string,
	version: VersionRow,
	versions: readonly VersionRow[],
	constituents: readonly ConstituentRow[],
	day: IsoDate
): Promise<Answers> {
	const rows = await standingAnswers(trx, [materialId]);
	const since = sameSince(version, versions);
	const answers = questionsFor(traitsOf(constituents)).map((question): AnswerView => {
		const given = rows.find((row) => row.question === question) ?? null;
		return { question, given, standing: answerStanding(given, since, day) };
	});
	return {
		answers,
		given: answers.filter(({ standing }) => standing === 'given').length,
		limits: (await limitsOf(trx, [materialId])).map(plainLimit)
	};
}

/** The oldest version without interruption that says what this one says; a draft stands for itself. */
function sameSince(version: VersionRow, versions: readonly VersionRow[]): number {
	let since = version.number;
	for (const earlier of versions.filter(({ number }) => number < version.number)) {
		if (earlier.contentHash === null || earlier.contentHash !== version.contentHash) break;
		since = earlier.number;
	}
	return since;
}

const plainFigure = (text: string | null) =>
	text === null ? null : formatExact(decimalOf(text, LIMIT_DECIMALS), LIMIT_DECIMALS);
const plainLimit = (row: LimitRow): LimitRow => ({ ...row, low: plainFigure(row.low), high: plainFigure(row.high) });

/** Puts an answer beside the earlier ones; the newest stands. */
export function recordAnswer(actor: Actor, code: string, number: number, input: AnswerInput): Promise<void> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const versions = await versionsOfMaterial(trx, material.id);
		if (!versions.some((version) => version.number === number)) throw new Refused('not-found');
		if (input.documentId) await citeDocument(trx, actor, material.id, input.documentId);
		const answer = {
			question: input.question,
			answer: input.answer,
			law: input.question === 'allergens' ? input.law : null,
			quantifiedFrom: input.quantifiedFrom || null,
			documentId: input.answer === 'withdrawn' ? null : input.documentId,
			dated: input.dated,
			goodUntil: input.goodUntil,
			remark: input.remark
		};
		const id = await insertAnswer(trx, {
			...answer,
			materialId: material.id,
			versionNumber: number,
			personId: actor.personId
		});
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'answer-recorded',
			subject: `material-answer/${id}`,
			after: answer,
			reason: input.remark || null
		});
	});
}

/** A document that is cited belongs to the material from then on. */
async function citeDocument(trx: Trx, actor: Actor, materialId: string, documentId: string): Promise<void> {
	await documentById(trx, documentId);
	const attached = await documentsOf(trx, 'material', materialId);
	if (attached.some(({ id }) => id === documentId)) return;
	await insertLink(trx, documentId, { kind: 'material', id: materialId }, actor.personId);
}

export function addUseLimit(actor: Actor, code: string, input: UseLimitInput): Promise<void> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		await citeDocument(trx, actor, material.id, input.documentId);
		const limit = {
			kind: input.kind,
			category: input.category || null,
			low: input.low.replace(',', '.') || null,
			high: input.high.replace(',', '.') || null,
			documentId: input.documentId,
			page: input.page === '' ? null : Number(input.page)
		};
		const id = await insertLimit(trx, { ...limit, materialId: material.id, personId: actor.personId });
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'use-limit-added',
			subject: `use-limit/${id}`,
			after: limit
		});
	});
}

/** Takes a limit out of use; the audit keeps it with the reason. */
export function withdrawUseLimit(actor: Actor, code: string, id: string, reason: string): Promise<void> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const limit = await lockLimit(trx, id);
		if (limit.materialId !== material.id) throw new Refused('not-found');
		await withdrawLimit(trx, id);
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'use-limit-withdrawn',
			subject: `use-limit/${id}`,
			before: plainLimit(limit),
			reason
		});
	});
}
