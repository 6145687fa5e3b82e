import { substanceKey } from '../../src/lib/domain/material/substance-key';
import type { ConstituentRowInput } from '../../src/lib/schemas/material';
import type { Actor } from '../../src/lib/server/access/actor';
import { newId } from '../../src/lib/server/db/id';
import { createFormula, releaseFormula, saveFormulaDraft } from '../../src/lib/server/services/formulas';
import {
	createMaterial,
	readMaterial,
	releaseMaterial,
	saveMaterialDraft
} from '../../src/lib/server/services/materials';
import { fileStatement } from './documents';
import { DEMO_FORMULAS } from './formulas';
import { DEMO_MATERIALS, type DemoMaterial } from './materials';

const FIRST_REV = 1;

function rowsOf({ parts }: DemoMaterial, documentId: string): ConstituentRowInput[] {
	return parts.map((part) => ({
		inci: part.inci,
		cas: part.cas ?? '',
		ec: '',
		min: part.min ?? '',
		typical: part.typical ?? '',
		max: part.max ?? '',
		role: part.ofWhich ? 'ofWhich' : (part.role ?? 'ingredient'),
		parent: part.ofWhich
			? parts.findIndex(({ inci }) => substanceKey(inci) === substanceKey(part.ofWhich ?? ''))
			: null,
		use: part.use ?? 'other',
		nano: part.nano ?? false,
		origin: null,
		documentId,
		page: 1
	}));
}

export async function seedMaterials(formulator: Actor): Promise<void> {
	for (const material of DEMO_MATERIALS) {
		const { code, tradeName, supplier } = material;
		await createMaterial(formulator, { code, tradeName, supplier });
		const { material: made } = await readMaterial(formulator, code, 1);
		const documentId = await fileStatement(formulator, material, made.id);
		const rows = rowsOf(material, documentId);
		const rev = await saveMaterialDraft(formulator, code, 1, { rev: FIRST_REV, rows });
		await releaseMaterial(formulator, code, 1, rev);
	}
}

const FORMULA_CODES = new Set(DEMO_FORMULAS.map(({ code }) => code));

export async function seedFormulas(formulator: Actor): Promise<void> {
	for (const { code, name, lines } of DEMO_FORMULAS) {
		await createFormula(formulator, { code, name });
		const rev = await saveFormulaDraft(formulator, code, 1, {
			rev: FIRST_REV,
			lines: lines.map(([phase, material, percent]) => ({
				id: newId<'line'>(),
				phase,
				kind: FORMULA_CODES.has(material) ? 'formula' : 'material',
				min: '',
				max: '',
				pinned: null,
				pinReason: '',
				code: material,
				percent: percent === 'rest' ? '' : percent,
				qs: percent === 'rest'
			}))
		});
		await releaseFormula(formulator, code, 1, rev);
	}
}
