import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor, Role } from '$lib/server/access/actor';
import { withActor } from '$lib/server/db/with-actor';
import { newId } from '$lib/server/db/id';
import { fileDocument, storeBytes } from '$lib/server/services/documents';
import { moveDueVersions } from '$lib/server/services/due-versions';
import { beginImport, commitImport, discardImport, mendRow, readImport } from '$lib/server/services/material-imports';
import { commitMaterialImport, readMaterialImport } from '$lib/server/services/material-import-run';
import { templateRows, templateWorkbook } from '$lib/server/services/material-import-template';
import {
	createMaterial,
	draftMaterial,
	readMaterial,
	readMaterials,
	releaseMaterial,
	saveMaterialDraft
} from '$lib/server/services/materials';
import { materialDraftSchema } from '$lib/schemas/material';
import { insertPerson } from './support/people';

let owner: pg.Client;
let formulator: Actor;
let assessor: Actor;
let client: Actor;
const person = (name: string, role: Role, clientId: string | null = null) => insertPerson(owner, name, role, clientId);

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	formulator = await person('formulator', 'formulator');
	assessor = await person('assessor', 'assessor');
	const clientId = newId();
	await owner.query(`insert into client (id, name) values ($1, 'A brand')`, [clientId]);
	client = await person('client', 'client', clientId);
});
afterAll(() => owner.end());

const quiet = () => undefined;
const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });

let filed = 0;
async function file(content: string | Uint8Array, fileName: string, mediaType = 'text/csv'): Promise<string> {
	filed += 1;
	const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
	return withActor(formulator, async (trx) => {
		const stored = await storeBytes(trx, formulator, { bytes, mediaType, fileName });
		return fileDocument(trx, formulator, stored, {
			kind: 'composition',
			title: `Sheet ${filed}`,
			dated: null,
			expires: null,
			subjects: []
		});
	});
}
async function imported(content: string | Uint8Array, mediaType?: string): Promise<string> {
	const id = await beginImport(formulator, await file(content, 'sheet.csv', mediaType));
	await readMaterialImport(formulator, id, quiet);
	return id;
}
const view = (id: string, show: 'faulty' | 'all' | null = null) => readImport(formulator, id, { show, page: 1 });
const faultsOf = async (id: string) =>
	(await view(id, 'faulty')).rows.rows.flatMap(({ number, faults }) =>
		faults.map(({ field, why, limit }) => [number, field, why, limit])
	);
const HEAD = 'material_code;trade_name;supplier;constituent;cas;min;typical;max;role;part_of;function;document';
const sheet = (...rows: readonly string[]) => [HEAD, ...rows].join('\n');

describe('the template', () => {
	test.each(['csv', 'xlsx'])('as %s goes in as it is', async (kind) => {
		const id =
			kind === 'csv'
				? await imported(
						templateRows()
							.map((row) => row.map((cell) => (cell.includes(',') ? `"${cell}"` : cell)).join(','))
							.join('\n')
					)
				: await imported(await templateWorkbook(), XLSX);
		expect(await faultsOf(id)).toEqual([]);
		expect((await view(id)).record).toMatchObject({ state: 'judged', totalRows: 7, newMaterials: 3 });
	});
});

describe('a sheet', () => {
	test('is refused as a whole when it lacks a column, or is no sheet', async () => {
		const lacks = await imported('material_code;trade_name\nA;B');
		expect((await view(lacks)).record).toMatchObject({
			state: 'unreadable',
			problem: { kind: 'columnsMissing', columns: ['constituent'] }
		});
		const none = await imported('%PDF-1.4', 'application/pdf');
		expect((await view(none)).record).toMatchObject({ state: 'unreadable', problem: { kind: 'notASheet' } });
	});
	test('names every fault by row, column, value and limit', async () => {
		const id = await imported(
			sheet(
				'I-1;One;S;Glycerin;56-81-4;;99,5;;;;;',
				';;;Aqua;;;0.5;;;;;',
				'I-2;Two;S;Aqua;;;1.000,5;;;;;',
				'I-3;Three;S;Aqua;;60;;70;;;;',
				';;;Glycerin;;45;;50;;;;',
				'i 4;Four;S;Aqua;;;100;;;;;',
				'I-5;;;Aqua;;;100;;solvent;;;Nothing filed',
				'I-6;Six;S;Parfum;;;100;;;;;',
				';;Other;Linalool;;;3;;of which;Perfume;;'
			)
		);
		expect(await faultsOf(id)).toEqual([
			[2, 'cas', 'checkDigit', '5'],
			[4, 'typical', 'grouping', null],
			[5, 'material', 'minimaAbove100', '5'],
			[7, 'material_code', 'codeShape', null],
			[8, 'trade_name', 'missing', null],
			[8, 'supplier', 'missing', null],
			[8, 'role', 'wordUnknown', 'ingredient, carry-over, impurity, processing aid, of which'],
			[8, 'document', 'documentUnknown', null],
			[10, 'supplier', 'differsFromFirst', 'S'],
			[10, 'part_of', 'parentUnknown', null]
		]);
		await expect(commitImport(formulator, id, { release: 'drafts', effectiveFrom: null })).rejects.toThrow(
			refusal('blocked', { faultyRows: 6 })
		);
	});
	test('is mended cell by cell, and then makes all', async () => {
		const id = await imported(
			sheet(
				'M-1;One;S;Glycerin;56-81-4;;99,5;;;;;',
				';;;Aqua;;;0.5;;;;;',
				'M-2;Two;S;Aqua;;60;;70;;;;',
				';;;Glycerin;;45;;50;;;;'
			)
		);
		await mendRow(formulator, id, { number: 2, cells: { cas: ' 56-81-5 ' } });
		expect(await faultsOf(id)).toEqual([[4, 'material', 'minimaAbove100', '5']]);
		await mendRow(formulator, id, { number: 5, cells: { min: '30' } });
		expect((await view(id)).record).toMatchObject({ faultyRows: 0, newMaterials: 2 });
		await commitImport(formulator, id, { release: 'release', effectiveFrom: null });
		await commitMaterialImport(formulator, id, quiet);
		expect((await view(id)).record).toMatchObject({ state: 'committed', newMaterials: 2 });
		const { version, constituents, documents, material } = await readMaterial(formulator, 'M-1', null);
		expect(version).toMatchObject({ number: 1, state: 'released' });
		expect(material).toMatchObject({ tradeName: 'One', supplier: 'S' });
		expect(constituents.map(({ inci, typical }) => [inci, typical])).toEqual([
			['Glycerin', '99.50000000'],
			['Aqua', '0.50000000']
		]);
		// The sheet itself is what says so.
		expect(documents.map(({ id: document }) => document)).toEqual([constituents[0]?.source_document_id]);
	});
	test('a mended row may move to another material', async () => {
		const id = await imported(sheet('V-1;One;S;Aqua;;;50;;;;;', 'V-2;Two;S;Glycerin;;;50;;;;;'));
		expect((await view(id)).record.faultyRows).toBe(2);
		await mendRow(formulator, id, { number: 3, cells: { material_code: 'v-1', trade_name: '' } });
		expect((await view(id)).record).toMatchObject({ faultyRows: 0, newMaterials: 1 });
	});
	test('makes a new version of what is here, leaves alone what it only repeats, and asks for open drafts to be finished', async () => {
		for (const code of ['H-SAME', 'H-MOVES', 'H-DRAFT']) {
			await createMaterial(formulator, { code, tradeName: `Name of ${code}`, supplier: 'S' });
			const rows = [
				{ inci: 'Aqua', typical: '40' },
				{ inci: 'Glycerin', typical: '60' }
			];
			const rev = await saveMaterialDraft(formulator, code, 1, materialDraftSchema.parse({ rev: 1, rows }));
			await releaseMaterial(formulator, code, 1, rev);
		}
		await draftMaterial(formulator, 'H-DRAFT');
		const rows = (code: string, water: string) => [
			`${code};;;AQUA;;;${water};;;;;`,
			`;;;Glycerin;;;${100 - Number(water)};;;;;`
		];
		const id = await imported(sheet(...rows('H-SAME', '40.0'), ...rows('H-MOVES', '39'), ...rows('H-DRAFT', '40')));
		expect(await faultsOf(id)).toEqual([[6, 'material_code', 'draftOpen', '2']]);
		expect((await view(id)).record).toMatchObject({ newMaterials: 0, newVersions: 1, unchanged: 1 });
		await releaseMaterial(formulator, 'H-DRAFT', 2, 1);
		await mendRow(formulator, id, { number: 6, cells: {} });
		await commitImport(formulator, id, { release: 'drafts', effectiveFrom: null });
		await commitMaterialImport(formulator, id, quiet);
		const numbers = await Promise.all(
			['H-SAME', 'H-MOVES', 'H-DRAFT'].map(async (code) => (await readMaterial(formulator, code, null)).version.number)
		);
		expect(numbers).toEqual([1, 2, 2]);
	});
	test('is given back whole when the workspace moved before it was made', async () => {
		const id = await imported(sheet('W-1;One;S;Aqua;;;100;;;;;', 'W-2;Two;S;Aqua;;;100;;;;;'));
		await commitImport(formulator, id, { release: 'drafts', effectiveFrom: null });
		await createMaterial(formulator, { code: 'W-2', tradeName: 'Somebody else', supplier: 'S' });
		await commitMaterialImport(formulator, id, quiet);
		expect((await view(id)).record).toMatchObject({ state: 'judged', faultyRows: 1 });
		await expect(readMaterial(formulator, 'W-1', null)).rejects.toThrow(refusal('not-found'));
	});
	test('of 20,000 rows is judged and made', async () => {
		const rows = Array.from({ length: 4_000 }, (_, at) => [
			`L-${at};Large ${at};S;Aqua;;10;;90;;;;`,
			...['Glycerin', 'Propanediol', 'Citric Acid'].map((name) => `;;;${name};;1;;60;;;;`),
			';;;Phenoxyethanol;;;;< 1;;;preservative;'
		]).flat();
		const id = await imported(sheet(...rows));
		expect((await view(id)).record).toMatchObject({ totalRows: 20_000, faultyRows: 0, newMaterials: 4_000 });
		await commitImport(formulator, id, { release: 'drafts', effectiveFrom: null });
		await commitMaterialImport(formulator, id, quiet);
		const found = await readMaterials(formulator, { q: 'Large 3', page: 1, sort: '', dir: 'asc', supplier: '' });
		expect(found.page.total).toBe(1_111);
	}, 300_000);
	test('is judged by those who may; what is given up leaves no row', async () => {
		const id = await imported(sheet('X-1;One;S;Aqua;;;100;;;;;'));
		expect(() => mendRow(assessor, id, { number: 2, cells: {} })).toThrow(refusal('forbidden'));
		expect(() => readImport(client, id, { show: null, page: 1 })).toThrow(refusal('forbidden'));
		await discardImport(formulator, id);
		expect((await view(id)).record).toMatchObject({ state: 'discarded', totalRows: 0 });
		await expect(commitImport(formulator, id, { release: 'drafts', effectiveFrom: null })).rejects.toThrow(
			refusal('wrong-state', { state: 'discarded' })
		);
	});
});

describe('an effective day', () => {
	const rows = [{ inci: 'Aqua', typical: '100' }];
	const made = async (code: string) => {
		await createMaterial(formulator, { code, tradeName: code, supplier: 'S' });
		const rev = await saveMaterialDraft(formulator, code, 1, materialDraftSchema.parse({ rev: 1, rows }));
		await releaseMaterial(formulator, code, 1, rev, '2026-06-01');
		return draftMaterial(formulator, code);
	};
	test('cannot lie before the day of the version that answers now', async () => {
		const number = await made('E-1');
		await expect(releaseMaterial(formulator, 'E-1', number, 1, '2026-05-31')).rejects.toThrow(
			refusal('invalid', { field: 'effectiveFrom', value: '2026-05-31', limit: '2026-06-01' })
		);
		expect(await releaseMaterial(formulator, 'E-1', number, 1, '2026-06-01')).toMatchObject({ number });
	});
	test('to come is carried to the products once it is there', async () => {
		const number = await made('E-2');
		expect(await releaseMaterial(formulator, 'E-2', number, 1, '2999-01-01')).toMatchObject({
			effectiveFrom: '2999-01-01',
			effects: []
		});
		expect(await moveDueVersions('2998-12-31' as never)).toBe(0);
		expect(await moveDueVersions('2999-01-01' as never)).toBe(1);
		expect(await moveDueVersions('2999-01-01' as never)).toBe(0);
	});
});
