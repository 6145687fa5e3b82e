import type { FormulaLineInput } from '$lib/schemas/formula';
import type { LineView } from '$lib/schemas/grid-view';
import type { TrialInput } from '$lib/schemas/trial';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { formulaByCode, linesOfVersion, lockFormulaDraft, versionsOfFormula } from '../db/formulas';
import { newId } from '../db/id';
import { insertTrial, linesOfTrial } from '../db/trials';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { draftLines, openDraft } from './formulas';

const plainLine = ({ name: _name, ...line }: LineView): FormulaLineInput => line;

/** Keeps what was made of a version's saved lines, with what was measured and thought of it. */
export function recordTrial(actor: Actor, code: string, versionNumber: number, trial: TrialInput): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		await lockFormula(trx, formula.id);
		const version = (await versionsOfFormula(trx, formula.id)).find(({ number }) => number === versionNumber);
		if (!version) throw new Refused('not-found');
		const lines = (await linesOfVersion(trx, version.id)).map(plainLine);
		if (lines.length === 0) throw new Refused('blocked', { faults: [{ kind: 'noLines', by: null, path: null }] });
		const number = await insertTrial(trx, formula.id, trial, lines, actor.personId);
		await audit(trx, actor, {
			stream: { kind: 'formula', id: formula.id },
			action: 'trial-recorded',
			subject: `formula-version/${version.id}`,
			after: { number, ...trial }
		});
		return number;
	});
}

/** Numbers are given one at a time. */
const lockFormula = (trx: Trx, id: string) =>
	trx.selectFrom('formula').select('id').where('id', '=', id).forUpdate().executeTakeFirstOrThrow();

/** The trial's lines become the open draft, or the next one; the draft's number comes back. */
export function continueTrial(actor: Actor, code: string, number: number): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const lines = (await linesOfTrial(trx, formula.id, number)).map((line) => ({ ...line, id: newId<'line'>() }));
		const [newest] = await versionsOfFormula(trx, formula.id);
		if (!newest) throw new Refused('not-found');
		const draftNumber = newest.state === 'draft' ? newest.number : await openDraft(trx, actor, formula.id, newest);
		const draft = await lockFormulaDraft(trx, formula.id, draftNumber);
		await draftLines(trx, actor, formula.id, draft, lines, { action: 'trial-continued', after: { trial: number } });
		return draftNumber;
	});
}
