import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { materialDraftSchema, type MaterialDraft } from '$lib/schemas/material';
import type { Actor, Role } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';
import { fieldFaults } from '$lib/server/http/faults';
import {
	createMaterial,
	draftMaterial,
	readMaterial,
	readMaterials,
	releaseMaterial,
	saveMaterialDraft
} from '$lib/server/services/materials';
import { insertPerson } from './support/people';

let owner: pg.Client;
let formulator: Actor;
let administrator: Actor;
let client: Actor;

const person = (name: string, role: Role, clientId: string | null = null) => insertPerson(owner, name, role, clientId);

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	formulator = await person('formulator', 'formulator');
	administrator = await person('administrator', 'administrator');
	const clientId = newId();
	await owner.query(`insert into client (id, name) values ($1, 'A brand')`, [clientId]);
	client = await person('client', 'client', clientId);
});
afterAll(() => owner.end());

const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });
const sheet = (rev: number, rows: readonly object[]): MaterialDraft => materialDraftSchema.parse({ rev, rows });
const faultsOf = (rows: readonly object[]) => {
	const sent = { rev: 1, rows };
	const parsed = materialDraftSchema.safeParse(sent);
	return parsed.success ? [] : fieldFaults(parsed.error, sent);
};
const make = (code: string, supplier = 'Selby Oils') =>
	createMaterial(formulator, { code, tradeName: `Trade name of ${code}`, supplier });
const actionsOn = async (code: string): Promise<string[]> =>
	(
		await owner.query(
			`select r.action from audit_row r join audit_stream s on s.id = r.stream_id
			join material m on m.id = s.subject_id where m.code = $1 order by r.seq`,
			[code]
		)
	).rows.map((row) => row.action);

describe('a new material', () => {
	test('has an empty draft; its supplier is found by name, not made twice', async () => {
		await make('NEW-1');
		await make('NEW-2');
		const { version, constituents, material } = await readMaterial(formulator, 'NEW-1', null);
		expect({ state: version.state, number: version.number, rows: constituents.length }).toEqual({
			state: 'draft',
			number: 1,
			rows: 0
		});
		expect(material.supplier).toBe('Selby Oils');
		const { suppliers } = await readMaterials(formulator, { q: '', page: 1, sort: '', dir: 'asc', supplier: '' });
		expect(suppliers.filter((name) => name === 'Selby Oils')).toHaveLength(1);
	});
	test('cannot take a code that is taken', async () => {
		await make('TAKEN');
		await expect(make('TAKEN')).rejects.toThrow(refusal('exists', { field: 'code', value: 'TAKEN' }));
	});
	test('is made by those who may; a client sees none', async () => {
		const input = { code: 'NO', tradeName: 'No', supplier: 'Nobody' };
		expect(() => createMaterial(administrator, input)).toThrow(refusal('forbidden'));
		expect(() => readMaterials(client, { q: '', page: 1, sort: '', dir: 'asc', supplier: '' })).toThrow(
			refusal('forbidden')
		);
	});
});

describe('what cannot be taken names row, value and limit', () => {
	test.each([
		[{ cas: '56-81-4' }, 'rows.0.cas', '56-81-4', 'checkDigit', '5'],
		[{ ec: '200-289-4' }, 'rows.0.ec', '200-289-4', 'checkDigit', '5'],
		[{ typical: '-1' }, 'rows.0.typical', '-1', 'negative', '0'],
		[{ max: '100.5' }, 'rows.0.max', '100.5', 'aboveMost', '100'],
		[{ min: '< 1' }, 'rows.0.min', '< 1', 'openMinimum', null],
		[{ typical: 'some' }, 'rows.0.typical', 'some', 'notANumber', null],
		[{ role: 'ofWhich' }, 'rows.0.parent', '', 'parentMissing', null]
	])('%j', (row, path, value, why, limit) =>
		expect(faultsOf([{ inci: 'Glycerin', ...row }])).toContainEqual({ path, value, limit, why })
	);
});

describe('a draft', () => {
	test('keeps comma, open bound, parts, and marks a name that is not in the glossary', async () => {
		await make('KEEP');
		await saveMaterialDraft(
			formulator,
			'KEEP',
			1,
			sheet(1, [
				{ inci: 'Glycerin', cas: '56-81-5', ec: '200-289-5', min: '98,5', max: '100' },
				{ inci: 'Parfum', typical: '1' },
				{ inci: 'Linalool', role: 'ofWhich', parent: 1, typical: '< 0,1' },
				{ inci: 'Quite Unheard Of Extract', role: 'impurity', max: '< 0.001' }
			])
		);
		const { constituents, version } = await readMaterial(formulator, 'KEEP', 1);
		expect(version.rev).toBe(2);
		expect(
			constituents.map(({ inci, low, high, high_open, known }) => ({ inci, low, high, high_open, known }))
		).toEqual([
			{ inci: 'Glycerin', low: '98.50000000', high: '100.00000000', high_open: false, known: true },
			{ inci: 'Parfum', low: null, high: null, high_open: false, known: true },
			{ inci: 'Linalool', low: null, high: '0.10000000', high_open: true, known: true },
			{ inci: 'Quite Unheard Of Extract', low: null, high: '0.00100000', high_open: true, known: false }
		]);
		expect(constituents[2]?.parent_id).toBe(constituents[1]?.id);
	});

	test('of two people: the later one is refused with what the first saved, and nothing is lost', async () => {
		await make('BOTH');
		await saveMaterialDraft(formulator, 'BOTH', 1, sheet(1, [{ inci: 'Aqua', typical: '100' }]));
		await expect(
			saveMaterialDraft(formulator, 'BOTH', 1, sheet(1, [{ inci: 'Glycerin', typical: '100' }]))
		).rejects.toThrow(refusal('conflict', { rev: 2, theirs: [expect.objectContaining({ inci: 'Aqua' })] }));
		expect((await readMaterial(formulator, 'BOTH', 1)).constituents.map(({ inci }) => inci)).toEqual(['Aqua']);
	});
});

describe('a release', () => {
	test('of a contradiction is refused with by how much; the draft stays as it is', async () => {
		await make('AGAINST');
		const rows = [
			{ inci: 'Aqua', min: '60', max: '70' },
			{ inci: 'Glycerin', min: '45', max: '50' }
		];
		const rev = await saveMaterialDraft(formulator, 'AGAINST', 1, sheet(1, rows));
		await expect(releaseMaterial(formulator, 'AGAINST', 1, rev)).rejects.toThrow(
			refusal('blocked', { faults: [{ kind: 'minimaAbove100', by: '5' }] })
		);
		const { version, constituents } = await readMaterial(formulator, 'AGAINST', 1);
		expect([version.state, constituents.length]).toEqual(['draft', 2]);
	});
	test('of nothing is refused', async () => {
		await make('EMPTY');
		await expect(releaseMaterial(formulator, 'EMPTY', 1, 1)).rejects.toThrow(
			refusal('blocked', { faults: [expect.objectContaining({ kind: 'noConstituents' })] })
		);
	});
	test('freezes: neither the service nor the database takes another figure', async () => {
		await make('FROZEN');
		const rows = [{ inci: 'Aqua', typical: '100' }];
		const rev = await saveMaterialDraft(formulator, 'FROZEN', 1, sheet(1, rows));
		expect(await releaseMaterial(formulator, 'FROZEN', 1, rev)).toMatchObject({ number: 1, effects: [] });
		await expect(saveMaterialDraft(formulator, 'FROZEN', 1, sheet(rev, rows))).rejects.toThrow(refusal('frozen'));
		const { version } = await readMaterial(formulator, 'FROZEN', 1);
		expect(version.contentHash).toMatch(/^[0-9a-f]{64}$/);
		await expect(
			owner.query('update constituent set typical = 99 where material_version_id = $1', [version.id])
		).rejects.toThrow('released');
		expect(await actionsOn('FROZEN')).toEqual(['material-created', 'draft-saved', 'version-released']);
	});
	test('by somebody whose role does not permit it changes nothing', async () => {
		await make('ROLE');
		expect(() => releaseMaterial(administrator, 'ROLE', 1, 1)).toThrow(refusal('forbidden'));
	});
	test('is the beginning of the next draft, which says the same under the same hash', async () => {
		await make('NEXT');
		const rows = [
			{ inci: 'Parfum', typical: '100' },
			{ inci: 'Linalool', ec: '201-134-4', role: 'ofWhich', parent: 0, typical: '2' }
		];
		await releaseMaterial(formulator, 'NEXT', 1, await saveMaterialDraft(formulator, 'NEXT', 1, sheet(1, rows)));
		expect(await draftMaterial(formulator, 'NEXT')).toBe(2);
		await expect(draftMaterial(formulator, 'NEXT')).rejects.toThrow(refusal('exists', { field: 'draft' }));
		await releaseMaterial(formulator, 'NEXT', 2, 1);
		const { versions } = await readMaterial(formulator, 'NEXT', null);
		expect(versions).toHaveLength(2);
		expect(versions[0]?.contentHash).toBe(versions[1]?.contentHash);
		const third = await draftMaterial(formulator, 'NEXT');
		const changed = [rows[0] ?? {}, { ...rows[1], ec: '' }];
		const rev = await saveMaterialDraft(formulator, 'NEXT', third, sheet(1, changed));
		await releaseMaterial(formulator, 'NEXT', third, rev);
		const after = await readMaterial(formulator, 'NEXT', third);
		expect(after.version.contentHash).not.toBe(versions[0]?.contentHash);
	});
});

test('the list finds by code, supplier and constituent, and takes % and _ as they are', async () => {
	await make('FIND-1', 'Tamber Colours');
	await saveMaterialDraft(
		formulator,
		'FIND-1',
		1,
		sheet(1, [{ inci: 'Tocopherol', cas: '10191-41-0', typical: '100' }])
	);
	const codes = async (q: string, supplier = '') =>
		(await readMaterials(formulator, { q, page: 1, sort: 'code', dir: 'asc', supplier })).page.rows.map(
			({ code }) => code
		);
	expect(await codes('tocopherol')).toEqual(['FIND-1']);
	expect(await codes('10191-41-0')).toEqual(['FIND-1']);
	expect(await codes('', 'Tamber Colours')).toEqual(['FIND-1']);
	expect(await codes('FIND_1')).toEqual([]);
	expect(await codes('%')).toEqual([]);
});
