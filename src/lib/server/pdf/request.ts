import type { BatchSheetData, LabelCopyData, ProductFileData } from '../../../../templates/pdf/types';

/** What the parent process asks of the child: one request, one document. `creationDate` is an ISO instant. */
export type PdfRequest =
	| { readonly kind: 'label-copy'; readonly data: LabelCopyData; readonly creationDate: string }
	| { readonly kind: 'batch-sheet'; readonly data: BatchSheetData; readonly creationDate: string }
	| { readonly kind: 'product-file'; readonly data: ProductFileData; readonly creationDate: string };

/** One line of JSON on the child's standard error. `percent` counts the writing of pages, after the layout. */
export type PdfProgress =
	| { readonly step: 'layout' }
	| { readonly step: 'writing'; readonly percent: number }
	| { readonly step: 'failed'; readonly code: PdfFailureCode; readonly message: string };

export type PdfFailureCode =
	/** The caller's signal. */
	| 'cancelled'
	/** Longer than the time allowed; killed. */
	| 'timedOut'
	/** More memory than allowed. */
	| 'outOfMemory'
	/** The child could not be started at all. */
	| 'notStarted'
	/** The child could not read the request. */
	| 'badRequest'
	/** Anything else; the message says what. */
	| 'failed';
