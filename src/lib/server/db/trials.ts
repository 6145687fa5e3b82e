import { z } from 'zod';
import { formulaLineSchema, type FormulaLineInput } from '$lib/schemas/formula';
import type { TrialInput, TrialView } from '$lib/schemas/trial';
import { Refused } from '../refused';
import { newId } from './id';
import type { Trx } from './with-actor';

const kept = z.array(formulaLineSchema);

export async function trialsOf(trx: Trx, formulaId: string): Promise<TrialView[]> {
	const rows = await trx
		.selectFrom('trial')
		.innerJoin('person', 'person.id', 'trial.created_by')
		.select([
			'trial.number',
			'trial.made_on as madeOn',
			'trial.ph',
			'trial.viscosity',
			'trial.verdict',
			'trial.remark',
			'trial.picture_id as pictureId',
			'trial.lines',
			'person.name as by'
		])
		.where('trial.formula_id', '=', formulaId)
		.orderBy('trial.number', 'desc')
		.execute();
	return rows.map(({ lines, madeOn, ...row }) => ({ ...row, madeOn: madeOn ?? '', lines: lines.length }));
}

/** The lines that were tried. @throws Refused 'not-found'. */
export async function linesOfTrial(trx: Trx, formulaId: string, number: number): Promise<FormulaLineInput[]> {
	const row = await trx
		.selectFrom('trial')
		.select('lines')
		.where('formula_id', '=', formulaId)
		.where('number', '=', number)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return kept.parse(row.lines);
}

/** Keeps a trial under the formula's next number; the formula's row must be locked by the caller. */
export async function insertTrial(
	trx: Trx,
	formulaId: string,
	trial: TrialInput,
	lines: readonly FormulaLineInput[],
	personId: string
): Promise<number> {
	const { last } = await trx
		.selectFrom('trial')
		.select((eb) => eb.fn.max('number').as('last'))
		.where('formula_id', '=', formulaId)
		.executeTakeFirstOrThrow();
	const number = (last ?? 0) + 1;
	await trx
		.insertInto('trial')
		.values({
			id: newId(),
			formula_id: formulaId,
			number,
			lines: JSON.stringify(lines),
			made_on: trial.madeOn,
			ph: trial.ph,
			viscosity: trial.viscosity,
			verdict: trial.verdict,
			remark: trial.remark,
			picture_id: trial.pictureId || null,
			created_by: personId
		})
		.execute();
	return number;
}
