import type { LabelCopyData, ProductFileData } from '../../../../templates/pdf/types';

/** What the parent process asks of the child: one request, one document. `creationDate` is an ISO instant. */
export type PdfRequest =
	| { readonly kind: 'label-copy'; readonly data: LabelCopyData; readonly creationDate: string }
	| { readonly kind: 'product-file'; readonly data: ProductFileData; readonly creationDate: string };

/** One line of JSON on the child's standard error. */
export type PdfProgress =
	| { readonly step: 'started' }
	| { readonly step: 'layout' }
	| { readonly step: 'pages'; readonly done: number; readonly of: number }
	| { readonly step: 'failed'; readonly code: string; readonly message: string };

export type PdfFailure = 'cancelled' | 'timedOut' | 'outOfMemory' | 'notStarted' | 'badRequest' | 'failed';
