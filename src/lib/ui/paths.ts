/** Every address of the application is built here; no component spells one. */

type Query = Record<string, string | number | null | undefined>;

/** Leaves out what is empty, so that the plain page has the plain address. */
export function withQuery(path: string, query: Query = {}): string {
	const params = new URLSearchParams();
	for (const [name, value] of Object.entries(query)) {
		if (value !== null && value !== undefined && value !== '') params.set(name, String(value));
	}
	const text = params.toString();
	return text ? `${path}?${text}` : path;
}

const part = (text: string | number) => encodeURIComponent(String(text));
const product = (slug: string) => `/products/${part(slug)}`;

export const PRODUCT_PARTS = ['formula', 'composition', 'list', 'claims', 'label', 'file'] as const;
export type ProductPart = (typeof PRODUCT_PARTS)[number];

export const paths = {
	signIn: (query?: { next?: string }) => withQuery('/sign-in', query),
	reset: () => '/reset',
	account: () => '/account',
	signOut: () => '/sign-out',
	preferences: () => '/preferences',

	desk: () => '/desk',
	products: (query?: Query) => withQuery('/products', query),
	newProduct: () => '/products/new',
	product: (slug: string, query?: Query) => withQuery(product(slug), query),
	productDetails: (slug: string) => `${product(slug)}/details`,
	productPart: (slug: string, name: ProductPart, query?: Query) => withQuery(`${product(slug)}/${name}`, query),
	formulaOfProduct: (slug: string, query?: Query) => withQuery(`${product(slug)}/formula`, query),
	composition: (slug: string, query?: Query) => withQuery(`${product(slug)}/composition`, query),
	ingredientList: (slug: string, query?: Query) => withQuery(`${product(slug)}/list`, query),
	claims: (slug: string, query?: Query) => withQuery(`${product(slug)}/claims`, query),
	claim: (slug: string, claimId: string) => withQuery(`${product(slug)}/claims`, { claim: claimId }),
	label: (slug: string, query?: Query) => withQuery(`${product(slug)}/label`, query),
	labelDownload: (slug: string, copyId: string, as: 'pdf' | 'txt' | 'json') =>
		withQuery(`${product(slug)}/label/${part(copyId)}/download`, { as }),
	productFile: (slug: string, query?: Query) => withQuery(`${product(slug)}/file`, query),
	builtFile: (slug: string, number: number) => `${product(slug)}/file/${part(number)}`,

	materials: (query?: Query) => withQuery('/materials', query),
	newMaterial: () => '/materials/new',
	materialImports: (query?: Query) => withQuery('/materials/import', query),
	materialImport: (id: string, query?: Query) => withQuery(`/materials/import/${part(id)}`, query),
	materialImportReport: (id: string) => `/materials/import/${part(id)}/report.csv`,
	materialTemplate: (as: 'csv' | 'xlsx') => `/materials/import/template.${as}`,
	material: (code: string, query?: Query) => withQuery(`/materials/${part(code)}`, query),
	materialVersion: (code: string, version: string | number, query?: Query) =>
		withQuery(`/materials/${part(code)}/${part(version)}`, query),

	batch: (code: string, version: number) => `/formulas/${part(code)}/${part(version)}/batch`,
	batchPdf: (code: string, version: number, query: string) =>
		`/formulas/${part(code)}/${part(version)}/batch/pdf${query ? `?${query}` : ''}`,
	formulas: (query?: Query) => withQuery('/formulas', query),
	newFormula: () => '/formulas/new',
	formulaLines: (q: string, forCode: string) => withQuery('/formulas/lines.json', { q, for: forCode }),
	bulk: (code: string, version: number | null) => withQuery('/formulas/bulk.json', { code, version }),
	impact: (code: string) => `/formulas/${part(code)}/impact.json`,
	compare: (code: string, query?: Query) => withQuery(`/formulas/${part(code)}/compare`, query),
	family: (code: string) => `/formulas/${part(code)}/family`,
	formula: (code: string, query?: Query) => withQuery(`/formulas/${part(code)}`, query),
	formulaVersion: (code: string, version: string | number, query?: Query) =>
		withQuery(`/formulas/${part(code)}/${part(version)}`, query),

	evidence: (query?: Query) => withQuery('/evidence', query),
	evidenceItem: (id: string, query?: Query) => withQuery(`/evidence/${part(id)}`, query),
	evidencePage: (id: string, page: number) => withQuery(`/evidence/${part(id)}`, { page }),
	evidencePreview: (id: string, page: number | null) =>
		`/evidence/${part(id)}/preview${page === null ? '' : `#page=${page}`}`,
	/** The file itself; a browser that shows it opens it at the page. */
	evidenceFile: (id: string, query?: { as?: 'inline' | 'attachment' }, page?: number | null) =>
		withQuery(`/evidence/${part(id)}/file`, query) + (page ? `#page=${page}` : ''),

	people: (query?: Query) => withQuery('/people', query),
	rules: (query?: Query) => withQuery('/rules', query),
	act: (act: string) => `/rules/${part(act)}`,
	rule: (act: string, entry: string) => `/rules/${part(act)}/${part(entry)}`,
	audit: (stream: string, seq: string | number) => `/audit/${part(stream)}/${part(seq)}`,

	counter: () => '/counter',
	counterProduct: (slug: string, query?: Query) => withQuery(`/counter/${part(slug)}`, query),
	counterCopy: (slug: string, copyId: string, as: 'pdf' | 'txt' | 'json') =>
		withQuery(`/counter/${part(slug)}/copies/${part(copyId)}`, { as }),
	counterIssue: (slug: string, number: number) => `/counter/${part(slug)}/issues/${part(number)}`,

	api: {
		uploads: () => '/api/uploads',
		upload: (id: string) => `/api/uploads/${part(id)}`,
		uploadPart: (id: string, number: number) => `/api/uploads/${part(id)}/parts/${number}`,
		uploadComplete: (id: string) => `/api/uploads/${part(id)}/complete`,
		job: (id: string) => `/api/jobs/${part(id)}`
	}
} as const;
