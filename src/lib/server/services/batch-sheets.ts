import { join } from 'node:path';
import { batchSheet, type BatchLine } from '$lib/domain/composition/batch-sheet';
import { formatExact } from '$lib/domain/quantity/decimal';
import { formatRatio, ratio } from '$lib/domain/quantity/ratio';
import type { Id, Ratio } from '$lib/domain/quantity/units';
import {
	GRAM_DECIMALS,
	gramsOf,
	LOT_DECIMALS,
	lotOf,
	type BatchRequest,
	type BatchView
} from '$lib/schemas/batch-sheet';
import type { BatchSheetData } from '../../../../templates/pdf/types';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import { config } from '../config';
import { formulaOfKey, loadFormula, type MaterialVersionRef, type Tree } from '../db/basis';
import { formulaByCode, versionRef, versionsOfFormula, type FormulaHead, type FormulaVersionRow } from '../db/formulas';
import { withActor, type Trx } from '../db/with-actor';
import type { Attachment } from '../http/attachment';
import { renderInChild } from '../pdf/render-in-child';
import { Refused } from '../refused';

const EXACT_PLACES = 4;
const PRINT_MS = 20_000;
const PRINT_MB = 256;

export interface BatchSheetView {
	readonly formula: FormulaHead;
	readonly version: FormulaVersionRow;
	readonly batch: BatchView;
}

/** The weighings of a batch of one formula version. @throws Refused 'not-found'. */
export function readBatchSheet(
	actor: Actor,
	code: string,
	number: number,
	request: BatchRequest
): Promise<BatchSheetView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const version = (await versionsOfFormula(trx, formula.id)).find((each) => each.number === number);
		if (!version) throw new Refused('not-found');
		return { formula, version, batch: await weigh(trx, formula, version, request) };
	});
}

async function weigh(
	trx: Trx,
	formula: FormulaHead,
	version: FormulaVersionRow,
	request: BatchRequest
): Promise<BatchView> {
	const { tree, loaded } = await loadFormula(trx, versionRef(formula.id, version), today());
	const { refs, materials } = loaded;
	const outcome = batchSheet(
		{ formula: formula.id as Id<'formula'>, formulas: tree.formulas, materials },
		{ size: gramsOf(request.size) ?? 1n, step: gramsOf(request.step) ?? 1n, potency: potencyOf(request, refs) }
	);
	if (!outcome.ok) return { lines: [], total: '0', faults: outcome.faults.map(({ kind }) => kind) };
	const names = await namesOf(trx, tree);
	const lines = [...tree.formulas.values()].flatMap((each) => each.lines);
	const phases = new Map(lines.map(({ id, phase }) => [id as string, phase]));
	return {
		lines: outcome.value.map((line) => lineView(line, { refs, names, phases, request })),
		total: formatExact(
			outcome.value.reduce((sum, { amount }) => sum + amount, 0n),
			GRAM_DECIMALS
		),
		faults: []
	};
}

/** Nominal over actual content; only lots that were stated, and that the formula weighs. */
function potencyOf(
	{ lots }: BatchRequest,
	refs: ReadonlyMap<string, MaterialVersionRef>
): ReadonlyMap<Id<'material'>, Ratio> {
	const found = new Map<Id<'material'>, Ratio>();
	for (const { materialId, code } of refs.values()) {
		const lot = lotOf(lots[code] ?? '');
		if (lot !== null) found.set(materialId as Id<'material'>, ratio(100n * 10n ** BigInt(LOT_DECIMALS), lot));
	}
	return found;
}

async function namesOf(trx: Trx, tree: Tree): Promise<ReadonlyMap<string, string>> {
	const rows = await trx
		.selectFrom('formula')
		.select(['id', 'name'])
		.where('id', 'in', [...new Set([...tree.formulas.keys()].map(formulaOfKey))])
		.execute();
	return new Map(rows.map(({ id, name }) => [id, name]));
}

interface Around {
	readonly refs: ReadonlyMap<string, MaterialVersionRef>;
	readonly names: ReadonlyMap<string, string>;
	readonly phases: ReadonlyMap<string, string>;
	readonly request: BatchRequest;
}

function lineView(line: BatchLine, { refs, names, phases, request }: Around) {
	const material = refs.get(line.material);
	const code = material?.code ?? '';
	return {
		code,
		name: material?.tradeName ?? '',
		phase: line.path.map((id) => phases.get(id) ?? '').join(' › '),
		within: line.formulas.slice(1).map((key) => names.get(formulaOfKey(key)) ?? ''),
		amount: formatExact(line.amount, GRAM_DECIMALS),
		exact: formatRatio(line.exact, GRAM_DECIMALS, EXACT_PLACES, 'nearest'),
		takesRounding: line.takesRounding,
		lot: request.lots[code] ?? ''
	};
}

/** The sheet to weigh by, as PDF. @throws Refused 'blocked' where the formula cannot be weighed. */
export async function printBatchSheet(
	actor: Actor,
	code: string,
	number: number,
	request: BatchRequest
): Promise<Attachment> {
	const { formula, version, batch } = await readBatchSheet(actor, code, number, request);
	if (batch.faults.length > 0) throw new Refused('blocked', { faults: batch.faults });
	const data: BatchSheetData = {
		language: 'en',
		laboratory: config().workspaceName,
		formulaName: formula.name,
		formulaCode: formula.code,
		version: version.number,
		released: version.state === 'released',
		size: request.size.replace(',', '.'),
		step: request.step.replace(',', '.'),
		total: batch.total,
		lines: batch.lines.map(({ code: materialCode, name, phase, within, amount, lot }) => ({
			code: materialCode,
			name,
			phase,
			within: within.join(', '),
			amount,
			lot
		}))
	};
	const creationDate = (version.releasedAt ?? new Date(`${today()}T00:00:00Z`)).toISOString();
	const pdf = await renderInChild(
		{ kind: 'batch-sheet', data, creationDate },
		{
			childPath: join(config().buildWorkerDir, 'pdf-child.js'),
			timeoutMs: PRINT_MS,
			maxOldSpaceMb: PRINT_MB
		}
	);
	return {
		fileName: `${formula.code}_version-${version.number}_batch-${data.size}-g.pdf`,
		mediaType: 'application/pdf',
		body: new Uint8Array(pdf)
	};
}
