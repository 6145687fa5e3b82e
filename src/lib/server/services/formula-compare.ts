import { ingredientList } from '$lib/domain/ingredients/list';
import type { IsoDate } from '$lib/domain/quantity/units';
import { ALLERGENS, NAME_BOOK } from '$lib/reference';
import type { CompareView, ComparedRow } from '$lib/schemas/compare-view';
import type { LineView } from '$lib/schemas/grid-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import { formulaByCode, linesOfVersion, versionRef, versionsOfFormula, type FormulaVersionRow } from '../db/formulas';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { ingredientsIn, namedText, readVersion, type Named, type Read } from './formula-family';

/** Two versions of a formula by line, by ingredient and by the EU list. @throws Refused 'not-found' for a version that is not there. */
export function compareVersions(
	actor: Actor,
	code: string,
	older: number | null,
	newer: number | null
): Promise<CompareView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const versions = await versionsOfFormula(trx, formula.id);
		const b = pick(versions, newer ?? versions[0]?.number ?? 1);
		const a = pick(versions, older ?? versions[1]?.number ?? b.number);
		const [left, right] = [await sideOf(trx, formula.id, a), await sideOf(trx, formula.id, b)];
		return {
			formula: { code: formula.code, name: formula.name },
			versions: versions.map(({ number, state }) => ({ number, draft: state === 'draft' })),
			a: a.number,
			b: b.number,
			lines: joined(linesIn(left.lines), linesIn(right.lines)),
			ingredients: joined(ingredientTexts(left.read), ingredientTexts(right.read)),
			lists: { a: left.list, b: right.list }
		};
	});
}

function pick(versions: readonly FormulaVersionRow[], number: number): FormulaVersionRow {
	const found = versions.find((each) => each.number === number);
	if (!found) throw new Refused('not-found');
	return found;
}

interface Side {
	readonly lines: readonly LineView[];
	readonly read: Read | null;
	readonly list: string;
}

async function sideOf(trx: Trx, formulaId: string, version: FormulaVersionRow): Promise<Side> {
	const read = await readVersion(trx, versionRef(formulaId, version));
	return { lines: await linesOfVersion(trx, version.id), read, list: read ? listOf(read, today()) : '' };
}

/** As for a leave-on product: a formula alone does not know its use. */
const listOf = ({ composition, loaded }: Read, batchDay: IsoDate) =>
	ingredientList(composition, {
		market: 'EU',
		stay: 'leave-on',
		batchDay,
		substances: loaded.substances,
		allergens: ALLERGENS.EU,
		names: NAME_BOOK
	}).text;

type Texts = ReadonlyMap<string, { readonly name: string; readonly text: string }>;

const amountOf = ({ qs, percent, min, max }: LineView) =>
	qs ? 'q.s.' : min || max ? `${percent} (${min || percent}–${max || percent})` : percent;

/** Lines of one material are one entry; what stands twice is written twice. */
function linesIn(lines: readonly LineView[]): Texts {
	const found = new Map<string, { name: string; text: string }>();
	for (const line of lines) {
		const known = found.get(line.code);
		const text = known ? `${known.text} + ${amountOf(line)}` : amountOf(line);
		found.set(line.code, { name: line.name, text });
	}
	return found;
}

const ingredientTexts = (read: Read | null): Texts =>
	new Map(
		(read ? ingredientsIn(read) : []).map((named: Named) => [named.key, { name: named.name, text: namedText(named) }])
	);

const joined = (a: Texts, b: Texts): ComparedRow[] =>
	[...new Set([...b.keys(), ...a.keys()])].map((key) => ({
		key,
		name: b.get(key)?.name ?? a.get(key)?.name ?? '',
		a: a.get(key)?.text ?? null,
		b: b.get(key)?.text ?? null
	}));
