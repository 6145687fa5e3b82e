import { batchSheetDocument } from '../../../../templates/pdf/batch-sheet';
import { labelCopy } from '../../../../templates/pdf/label-copy';
import { productFile } from '../../../../templates/pdf/product-file';
import { phrasesIn } from '../../../../templates/phrases/index';
import { renderPdf, type PdfDetails } from './document';
import { openShelf } from './fonts';
import type { PdfRequest } from './request';

type Options = Pick<PdfDetails, 'fontFolder' | 'onWritten'>;

/** Turns a request into the file it asks for. Runs for seconds: see `renderInChild`. */
export async function print(request: PdfRequest, options: Options = {}): Promise<Uint8Array> {
	const creationDate = new Date(request.creationDate);
	const shelf = openShelf(options.fontFolder);
	const t = phrasesIn(request.data.language);
	if (request.kind === 'batch-sheet') {
		const { data } = request;
		return renderPdf(batchSheetDocument(data), {
			...options,
			creationDate,
			title: t.batch.title(data.formulaName),
			author: data.laboratory,
			subject: data.formulaCode
		});
	}
	if (request.kind === 'label-copy') {
		const { data } = request;
		return renderPdf(labelCopy(data, shelf), {
			...options,
			creationDate,
			title: `${t.copy.running(data.productName)}, ${t.copy.title(data.packName, data.marketName)}`,
			author: data.compiledBy,
			subject: data.clientName
		});
	}
	const { data } = request;
	return renderPdf(productFile(data, shelf), {
		...options,
		creationDate,
		title: `${t.file.running(data.productName)}, ${t.file.issue(data.issue.number)}`,
		author: data.compiledBy.organisation,
		subject: data.subtitle
	});
}
