import type pg from 'pg';
import { formulaDraftSchema } from '$lib/schemas/formula';
import { copyDraftSchema, type CopyDraft } from '$lib/schemas/label-copy';
import { materialDraftSchema } from '$lib/schemas/material';
import { productSchema } from '$lib/schemas/product';
import type { Actor } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';
import { createFormula, draftFormula, releaseFormula, saveFormulaDraft } from '$lib/server/services/formulas';
import { createMaterial, draftMaterial, releaseMaterial, saveMaterialDraft } from '$lib/server/services/materials';
import { createProduct } from '$lib/server/services/products';
import { insertPerson } from './people';

/** People, materials, formulas and products made by the services, so that copies stand on what a person could have made. */
export class Workshop {
	constructor(
		readonly owner: pg.Client,
		readonly officer: Actor,
		readonly formulator: Actor
	) {}

	static async open(owner: pg.Client): Promise<Workshop> {
		const officer = await insertPerson(owner, 'officer', 'officer');
		return new Workshop(owner, officer, await insertPerson(owner, 'formulator', 'formulator'));
	}

	async client(name: string): Promise<Actor> {
		const id = newId();
		await this.owner.query('insert into client (id, name) values ($1, $2)', [id, name]);
		return insertPerson(this.owner, name.toLowerCase().replaceAll(' ', '-'), 'client', id);
	}

	/** Releases the next version of a material; figures are percentages as typed. */
	async material(code: string, rows: readonly object[], isNew = true): Promise<void> {
		if (isNew)
			await createMaterial(this.formulator, { code, tradeName: `Trade ${code}`, supplier: 'Quillstone Extracts' });
		const number = isNew ? 1 : await draftMaterial(this.formulator, code);
		const rev = await saveMaterialDraft(this.formulator, code, number, materialDraftSchema.parse({ rev: 1, rows }));
		await releaseMaterial(this.formulator, code, number, rev);
	}

	/** Releases the next version of a formula; a percentage of "rest" is q.s. */
	async formula(code: string, lines: readonly (readonly [string, string])[], isNew = true): Promise<void> {
		if (isNew) await createFormula(this.formulator, { code, name: `Formula ${code}` });
		const number = isNew ? 1 : await draftFormula(this.formulator, code);
		const draft = formulaDraftSchema.parse({
			rev: 1,
			lines: lines.map(([material, percent]) => ({
				id: newId<'line'>(),
				phase: 'A',
				kind: 'material',
				code: material,
				percent: percent === 'rest' ? '' : percent,
				qs: percent === 'rest'
			}))
		});
		const rev = await saveFormulaDraft(this.formulator, code, number, draft);
		await releaseFormula(this.formulator, code, number, rev);
	}

	/** A product for the EU in one pack; gives its slug. */
	product(client: Actor, name: string, formulaCode: string, change: object = {}): Promise<string> {
		return createProduct(
			this.officer,
			productSchema.parse({
				clientId: client.clientId,
				name,
				brandName: 'Nightfold',
				functionText: 'Face cream',
				productType: 'face-cream',
				stay: 'leave-on',
				sites: ['face'],
				ages: ['adult'],
				spray: 'none',
				formulaCode,
				clientCode: '',
				responsibleName: 'Pell & Fennick Ltd',
				responsibleAddress: '7 Example Quay, Dublin, Ireland',
				originCountry: '',
				pack: { name: 'Carton', size: '50', unit: 'ml', gtin: '' },
				...change
			})
		);
	}

	async packOf(slug: string): Promise<string> {
		const { rows } = await this.owner.query<{ id: string }>(
			'select k.id from pack k join product p on p.id = k.product_id where p.slug = $1 order by k.created_at, k.id',
			[slug]
		);
		return rows[0]?.id ?? '';
	}

	async addPack(slug: string, name: string): Promise<string> {
		const id = newId();
		await this.owner.query(
			`insert into pack (id, product_id, client_id, name, size, unit, created_by)
			select $1, id, client_id, $2, 200, 'ml', $3 from product where slug = $4`,
			[id, name, this.officer.personId, slug]
		);
		return id;
	}
}

export const filledDraft = (change: Partial<CopyDraft> = {}): CopyDraft =>
	copyDraftSchema.parse({
		rev: 1,
		brand: 'Nightfold',
		name: 'Nightfold Cream',
		function: 'Night face cream',
		durability: 'periodAfterOpening',
		months: '12',
		batch: 'printed at filling',
		responsibleName: 'Pell & Fennick Ltd',
		responsibleAddress: '7 Example Quay, Dublin, Ireland',
		...change
	});
