import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { formulaDraftSchema, type FormulaDraft } from '$lib/schemas/formula';
import { materialDraftSchema } from '$lib/schemas/material';
import type { Actor } from '$lib/server/access/actor';
import {
	createFormula,
	draftFormula,
	readFormula,
	readFormulas,
	releaseFormula,
	saveFormulaDraft,
	suggestLines
} from '$lib/server/services/formulas';
import { createMaterial, releaseMaterial, saveMaterialDraft } from '$lib/server/services/materials';
import { insertPerson } from './support/people';

let owner: pg.Client;
let formulator: Actor;
let assessor: Actor;

const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });

async function material(code: string, inci: string): Promise<void> {
	await createMaterial(formulator, { code, tradeName: `Trade name of ${code}`, supplier: 'Alder Supply' });
	const draft = materialDraftSchema.parse({ rev: 1, rows: [{ id: randomUUID(), inci, typical: '100' }] });
	const rev = await saveMaterialDraft(formulator, code, 1, draft);
	await releaseMaterial(formulator, code, 1, rev);
}

interface LineOf {
	readonly id?: string;
	readonly code: string;
	readonly kind?: 'material' | 'formula';
	readonly percent?: string;
	readonly qs?: boolean;
}
const grid = (rev: number, lines: readonly LineOf[]): FormulaDraft =>
	formulaDraftSchema.parse({
		rev,
		lines: lines.map((line) => ({ id: randomUUID(), kind: 'material', ...line }))
	});
const made = (code: string) => createFormula(formulator, { code, name: `Name of ${code}` });
const WHOLE: readonly LineOf[] = [
	{ code: 'WATER', qs: true },
	{ code: 'GLYCEROL', percent: '5,25' }
];

/** A formula with one released version of the lines. */
async function released(code: string, lines: readonly LineOf[] = WHOLE): Promise<void> {
	await made(code);
	await releaseFormula(formulator, code, 1, await saveFormulaDraft(formulator, code, 1, grid(1, lines)));
}

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	formulator = await insertPerson(owner, 'formulator', 'formulator');
	assessor = await insertPerson(owner, 'assessor', 'assessor');
	await material('WATER', 'Aqua');
	await material('GLYCEROL', 'Glycerin');
});
afterAll(() => owner.end());

describe('a draft', () => {
	test('keeps the figures as they were typed, to the last decimal', async () => {
		await made('EXACT');
		await saveFormulaDraft(formulator, 'EXACT', 1, grid(1, [{ code: 'GLYCEROL', percent: '0,000001' }]));
		const { lines } = await readFormula(formulator, 'EXACT', 1);
		expect(lines.map(({ code, percent }) => [code, percent])).toEqual([['GLYCEROL', '0.000001']]);
	});

	test('saved by two people: the second is told what the first saved, and nothing is lost', async () => {
		await made('TWO');
		await saveFormulaDraft(formulator, 'TWO', 1, grid(1, [{ code: 'GLYCEROL', percent: '3' }]));
		const late = saveFormulaDraft(formulator, 'TWO', 1, grid(1, [{ code: 'GLYCEROL', percent: '4' }]));
		await expect(late).rejects.toThrow(
			refusal('conflict', { rev: 2, theirs: [expect.objectContaining({ code: 'GLYCEROL', percent: '3' })] })
		);
		const { lines } = await readFormula(formulator, 'TWO', 1);
		expect(lines.map(({ percent }) => percent)).toEqual(['3']);
	});

	test('with a code that no material has is refused, and the row is named', async () => {
		await made('UNKNOWN');
		await expect(
			saveFormulaDraft(formulator, 'UNKNOWN', 1, grid(1, [{ code: 'GLYCEROL' }, { code: 'NOWHERE' }]))
		).rejects.toThrow(
			refusal('invalid', {
				faults: [{ path: 'lines.1.code', value: 'NOWHERE', why: 'unknownCode', limit: null }]
			})
		);
	});

	test('is not the assessor’s to change', async () => {
		await made('GUARDED');
		expect(() => saveFormulaDraft(assessor, 'GUARDED', 1, grid(1, WHOLE))).toThrow(refusal('forbidden'));
		expect(() => createFormula(assessor, { code: 'OTHER', name: 'Other' })).toThrow(refusal('forbidden'));
	});
});

describe('a release', () => {
	test.each([
		[
			'99.75 %',
			[
				{ code: 'WATER', percent: '95' },
				{ code: 'GLYCEROL', percent: '4.75' }
			],
			'sumBelow100',
			'0.25'
		],
		[
			'100.5 %',
			[
				{ code: 'WATER', percent: '95' },
				{ code: 'GLYCEROL', percent: '5.5' }
			],
			'sumAbove100',
			'0.5'
		]
	])('of lines that sum to %s is refused, with the difference', async (_sum, lines, kind, by) => {
		const code = `SUM-${kind}`.toUpperCase();
		await made(code);
		const rev = await saveFormulaDraft(formulator, code, 1, grid(1, lines));
		await expect(releaseFormula(formulator, code, 1, rev)).rejects.toThrow(
			refusal('blocked', { faults: [expect.objectContaining({ kind, by })] })
		);
	});

	test('of an empty formula is refused', async () => {
		await made('EMPTY');
		await expect(releaseFormula(formulator, 'EMPTY', 1, 1)).rejects.toThrow(refusal('blocked'));
	});

	test('with a material that has no released version is refused', async () => {
		await createMaterial(formulator, { code: 'UNREADY', tradeName: 'Unready', supplier: 'Alder Supply' });
		await made('WITH-UNREADY');
		const rev = await saveFormulaDraft(formulator, 'WITH-UNREADY', 1, grid(1, [{ code: 'UNREADY', qs: true }]));
		await expect(releaseFormula(formulator, 'WITH-UNREADY', 1, rev)).rejects.toThrow(
			refusal('blocked', { faults: [expect.objectContaining({ kind: 'materialMissing' })] })
		);
	});

	test('of a bulk that contains itself is refused', async () => {
		await released('INNER');
		await released('OUTER', [{ code: 'INNER', kind: 'formula', qs: true }]);
		await draftFormula(formulator, 'INNER');
		const rev = await saveFormulaDraft(formulator, 'INNER', 2, grid(1, [{ code: 'OUTER', kind: 'formula', qs: true }]));
		await expect(releaseFormula(formulator, 'INNER', 2, rev)).rejects.toThrow(
			refusal('blocked', { faults: [expect.objectContaining({ kind: 'cycle' })] })
		);
	});

	test('of what somebody else has changed since is refused', async () => {
		await made('STALE');
		const rev = await saveFormulaDraft(formulator, 'STALE', 1, grid(1, WHOLE));
		await saveFormulaDraft(formulator, 'STALE', 1, grid(rev, WHOLE));
		await expect(releaseFormula(formulator, 'STALE', 1, rev)).rejects.toThrow(refusal('conflict'));
	});

	test('freezes the lines, for the application and for the owner of the tables', async () => {
		await released('FROZEN');
		await expect(saveFormulaDraft(formulator, 'FROZEN', 1, grid(2, WHOLE))).rejects.toThrow(refusal('frozen'));
		await expect(
			owner.query(
				`update formula_line set share = 6 where share = 5.25 and formula_version_id in
				(select v.id from formula_version v join formula f on f.id = v.formula_id where f.code = 'FROZEN')`
			)
		).rejects.toThrow(/frozen|released/i);
	});

	test('is followed by one open draft with the same lines', async () => {
		await released('NEXT');
		expect(await draftFormula(formulator, 'NEXT')).toBe(2);
		const { lines, before } = await readFormula(formulator, 'NEXT', 2);
		expect(lines.map(({ code, percent, qs }) => [code, percent, qs])).toEqual([
			['WATER', '', true],
			['GLYCEROL', '5.25', false]
		]);
		expect(before?.number).toBe(1);
		await expect(draftFormula(formulator, 'NEXT')).rejects.toThrow(refusal('exists', { field: 'draft', value: 2 }));
	});
});

test('a list of formulas is found by code and by name, without minding case', async () => {
	await released('FINDABLE');
	const found = (q: string) => readFormulas(formulator, { q, page: 1, sort: '', dir: 'asc' });
	expect((await found('findab')).rows.map(({ code }) => code)).toEqual(['FINDABLE']);
	expect((await found('name of findable')).total).toBe(1);
	expect((await found('%')).total).toBe(0);
});

test('the grid offers released materials by code, trade name and INCI', async () => {
	for (const typed of ['glycerol', 'trade name of gly', 'GLYCERIN'])
		expect(await suggestLines(formulator, typed, 'NONE'), typed).toContainEqual(
			expect.objectContaining({ kind: 'material', material: expect.objectContaining({ code: 'GLYCEROL' }) })
		);
});
