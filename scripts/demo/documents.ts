import type { TDocumentDefinitions } from 'pdfmake/interfaces';
import type { Actor } from '../../src/lib/server/access/actor';
import { withActor } from '../../src/lib/server/db/with-actor';
import { renderPdf } from '../../src/lib/server/pdf/document';
import { fileDocument, storeBytes } from '../../src/lib/server/services/documents';
import type { DemoMaterial, DemoPart } from './materials';

const DATED = '2025-02-09';
const GOOD_UNTIL = '2028-02-09';

const figure = ({ min, typical, max }: DemoPart): string => {
	if (min && max) return `${min} to ${max}`;
	return typical ?? (max ? `at most ${max}` : 'balance');
};

const statement = ({ tradeName, code, supplier, parts }: DemoMaterial): TDocumentDefinitions => ({
	defaultStyle: { font: 'Noto', fontSize: 10 },
	content: [
		{ text: 'Composition statement', fontSize: 18 },
		{ text: `${tradeName}, ${code}`, margin: [0, 6, 0, 2] },
		{ text: `${supplier}, ${DATED}. Invented for demonstration.`, margin: [0, 0, 0, 12] },
		{
			table: {
				headerRows: 1,
				widths: ['*', 90, 120],
				body: [
					['Constituent', 'CAS number', '% of the material'],
					...parts.map((part) => [
						part.inci,
						part.cas ?? '',
						`${figure(part)}${part.ofWhich ? `, of ${part.ofWhich}` : ''}`
					])
				]
			}
		}
	]
});

/** Files the supplier's composition statement of a material and answers with its document. */
export async function fileStatement(actor: Actor, material: DemoMaterial, materialId: string): Promise<string> {
	const bytes = await renderPdf(statement(material), {
		creationDate: new Date(`${DATED}T00:00:00Z`),
		title: `Composition statement ${material.code}`,
		author: material.supplier,
		subject: material.tradeName
	});
	return withActor(actor, async (trx) => {
		const fileName = `${material.code.toLowerCase()}-composition.pdf`;
		const file = await storeBytes(trx, actor, { bytes, mediaType: 'application/pdf', fileName });
		return fileDocument(trx, actor, file, {
			kind: 'composition',
			title: `Composition statement ${material.code}`,
			dated: DATED,
			expires: GOOD_UNTIL,
			subjects: [{ kind: 'material', id: materialId }]
		});
	});
}
