/**
 * Who may call what: the specification, written by hand. Columns are officer, formulator, assessor (no product assigned),
 * administrator, client of the product, and nobody. Addresses of a change name nothing that exists, so that 404 means
 * "allowed, nothing there" and 403 "not allowed"; a client always learns 404 of the laboratory's side, a stranger is sent to
 * the door (303) or, on a JSON route, told to sign in (401). An upload is known to its own person alone, whatever the role.
 */
export interface AccessRow {
	readonly route: string;
	/** GET, or the form action or verb that changes something. */
	readonly call: string;
	readonly address: string;
	readonly body?: Readonly<Record<string, string>> | { readonly payload: object } | { readonly json: object };
	readonly answers: readonly [
		officer: number,
		formulator: number,
		assessor: number,
		administrator: number,
		client: number,
		nobody: number
	];
}

const NO_ID = '01900000-0000-7000-8000-000000000000';
const HASH = '0'.repeat(64);
const STAFF = [200, 200, 200, 200, 404, 303] as const;
/** A product's pages: an assessor sees assigned products only. */
const PRODUCT = [200, 200, 404, 200, 404, 303] as const;
const OFFICER_CHANGES = [404, 403, 403, 403, 404, 303] as const;
const BENCH_CHANGES = [404, 404, 403, 403, 404, 303] as const;
const criteria = {
	legalCompliance: '',
	truthfulness: '',
	evidentialSupport: '',
	honesty: '',
	fairness: '',
	informedDecision: ''
};
const P = '/products/no-such-product';

export const ACCESS: readonly AccessRow[] = [
	{ route: '/(bench)/desk', call: 'GET', address: '/desk', answers: STAFF },
	{
		route: '/(bench)/audit/[stream]/[seq]',
		call: 'GET',
		address: `/audit/${NO_ID}/1`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{ route: '/(bench)/rules', call: 'GET', address: '/rules', answers: STAFF },
	{ route: '/(bench)/rules/[act]/[entry]', call: 'GET', address: '/rules/eu-1223-2009/art-33', answers: STAFF },
	{
		route: '/(bench)/products/[slug]/list',
		call: '?/arrange',
		address: `${P}/list`,
		body: { payload: { market: 'EU', names: ['Aqua'] } },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/list',
		call: '?/carryOver',
		address: `${P}/list`,
		body: { substanceId: NO_ID, materialId: NO_ID, leftOut: 'yes', reason: 'A' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/details',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/details',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/details',
		call: '?/save',
		address: `${P}/details`,
		body: {
			rev: '1',
			name: 'A',
			brandName: 'A',
			functionText: 'A',
			clientCode: '',
			responsibleName: 'A',
			responsibleAddress: 'A',
			originCountry: ''
		},
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/details',
		call: '?/addPack',
		address: `${P}/details`,
		body: { name: 'A', size: '50', unit: 'ml', gtin: '' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/details',
		call: '?/assign',
		address: `${P}/details`,
		body: { personId: NO_ID },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/details',
		call: '?/withdraw',
		address: `${P}/details`,
		body: { personId: NO_ID },
		answers: OFFICER_CHANGES
	},
	{ route: '/(bench)/people', call: 'GET', address: '/people', answers: [403, 403, 403, 200, 404, 303] },
	{
		route: '/(bench)/people',
		call: '?/addPerson',
		address: '/people',
		body: { name: 'A', email: 'no', password: '' },
		answers: [400, 400, 400, 400, 404, 303]
	},
	{
		route: '/(bench)/people',
		call: '?/addClient',
		address: '/people',
		body: { clientName: 'Pell & Fennick' },
		answers: [403, 403, 403, 409, 404, 303]
	},

	{ route: '/(bench)/materials', call: 'GET', address: '/materials', answers: STAFF },
	{ route: '/(bench)/materials/list.csv', call: 'GET', address: '/materials/list.csv', answers: STAFF },
	{ route: '/(bench)/materials/new', call: 'GET', address: '/materials/new', answers: [200, 200, 403, 403, 404, 303] },
	{
		route: '/(bench)/materials/new',
		call: '?/default',
		address: '/materials/new',
		body: { code: 'WATER', tradeName: 'A', supplier: 'B' },
		answers: [409, 409, 403, 403, 404, 303]
	},
	{
		route: '/(bench)/materials/[code]',
		call: 'GET',
		address: '/materials/WATER',
		answers: [303, 303, 303, 303, 404, 303]
	},
	{ route: '/(bench)/materials/[code]/[version]', call: 'GET', address: '/materials/WATER/1', answers: STAFF },
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/save',
		address: '/materials/NONE/1',
		body: { payload: { rev: 1, rows: [] } },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/release',
		address: '/materials/NONE/1',
		body: { payload: { rev: 1 } },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/draft',
		address: '/materials/NONE/1',
		body: {},
		answers: BENCH_CHANGES
	},

	{ route: '/(bench)/formulas', call: 'GET', address: '/formulas', answers: STAFF },
	{
		route: '/(bench)/formulas/lines.json',
		call: 'GET',
		address: '/formulas/lines.json?q=aqua',
		answers: STAFF
	},
	{
		route: '/(bench)/formulas/bulk.json',
		call: 'GET',
		address: '/formulas/bulk.json?code=F-0012',
		answers: STAFF
	},
	{
		route: '/(bench)/formulas/[code]/[version]',
		call: '?/trial',
		address: '/formulas/NO-SUCH/1',
		body: { madeOn: '2026-01-01', ph: '', viscosity: '', verdict: 'good', remark: '', pictureId: '' },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/formulas/[code]/[version]',
		call: '?/continueTrial',
		address: '/formulas/NO-SUCH/1',
		body: { number: '1' },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/formulas/[code]/[version]/batch',
		call: 'GET',
		address: '/formulas/F-0012/1/batch',
		answers: STAFF
	},
	{
		route: '/(bench)/formulas/[code]/[version]/batch/pdf',
		call: 'GET',
		address: '/formulas/F-0012/99/batch/pdf',
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(bench)/formulas/[code]/compare',
		call: 'GET',
		address: '/formulas/F-0012/compare',
		answers: STAFF
	},
	{
		route: '/(bench)/formulas/[code]/family',
		call: 'GET',
		address: '/formulas/F-0001/family',
		answers: STAFF
	},
	{
		route: '/(bench)/formulas/[code]/impact.json',
		call: 'GET',
		address: '/formulas/NO-SUCH/impact.json',
		answers: [404, 404, 403, 403, 404, 303]
	},
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/answer',
		address: '/materials/NONE/1',
		body: { question: 'nano', answer: 'absent', documentId: NO_ID },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/limit',
		address: '/materials/NONE/1',
		body: { kind: 'heatLimit', high: '40', documentId: NO_ID },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/[code]/[version]',
		call: '?/withdrawLimit',
		address: '/materials/NONE/1',
		body: { id: NO_ID, reason: 'A' },
		answers: BENCH_CHANGES
	},
	{ route: '/(bench)/formulas/new', call: 'GET', address: '/formulas/new', answers: [200, 200, 403, 403, 404, 303] },
	{
		route: '/(bench)/formulas/new',
		call: '?/default',
		address: '/formulas/new',
		body: { code: 'F-0012', name: 'A' },
		answers: [409, 409, 403, 403, 404, 303]
	},
	{
		route: '/(bench)/formulas/[code]',
		call: 'GET',
		address: '/formulas/F-0012',
		answers: [303, 303, 303, 303, 404, 303]
	},
	{ route: '/(bench)/formulas/[code]/[version]', call: 'GET', address: '/formulas/F-0012/1', answers: STAFF },
	{
		route: '/(bench)/formulas/[code]/[version]',
		call: '?/save',
		address: '/formulas/NONE/1',
		body: { payload: { rev: 1, lines: [] } },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/formulas/[code]/[version]',
		call: '?/release',
		address: '/formulas/NONE/1',
		body: { payload: { rev: 1 } },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/formulas/[code]/[version]',
		call: '?/draft',
		address: '/formulas/NONE/1',
		body: {},
		answers: BENCH_CHANGES
	},

	{ route: '/(bench)/materials/import', call: 'GET', address: '/materials/import', answers: STAFF },
	{
		route: '/(bench)/materials/import',
		call: '?/begin',
		address: '/materials/import',
		body: { documentId: NO_ID },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/import/template.csv',
		call: 'GET',
		address: '/materials/import/template.csv',
		answers: STAFF
	},
	{
		route: '/(bench)/materials/import/template.xlsx',
		call: 'GET',
		address: '/materials/import/template.xlsx',
		answers: STAFF
	},
	{
		route: '/(bench)/materials/import/[id]',
		call: 'GET',
		address: `/materials/import/${NO_ID}`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(bench)/materials/import/[id]',
		call: '?/mend',
		address: `/materials/import/${NO_ID}`,
		body: { number: '2', min: '1' },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/import/[id]',
		call: '?/commit',
		address: `/materials/import/${NO_ID}`,
		body: { release: 'drafts' },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/import/[id]',
		call: '?/discard',
		address: `/materials/import/${NO_ID}`,
		body: {},
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/materials/import/[id]/report.csv',
		call: 'GET',
		address: `/materials/import/${NO_ID}/report.csv`,
		answers: [404, 404, 404, 404, 404, 303]
	},

	{ route: '/(bench)/evidence', call: 'GET', address: '/evidence', answers: STAFF },
	{
		route: '/(bench)/evidence/[id]',
		call: 'GET',
		address: `/evidence/${NO_ID}`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(bench)/evidence/[id]',
		call: '?/attach',
		address: `/evidence/${NO_ID}`,
		body: { kind: 'material', address: 'WATER' },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/evidence/[id]',
		call: '?/detach',
		address: `/evidence/${NO_ID}`,
		body: { linkId: NO_ID },
		answers: BENCH_CHANGES
	},
	{
		route: '/(bench)/evidence/[id]/preview',
		call: 'GET',
		address: `/evidence/${NO_ID}/preview`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(bench)/evidence/[id]/file',
		call: 'GET',
		address: `/evidence/${NO_ID}/file`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/api/documents/[id]/file',
		call: 'GET',
		address: `/api/documents/${NO_ID}/file`,
		answers: [404, 404, 404, 404, 404, 401]
	},
	{
		route: '/api/uploads',
		call: 'POST',
		address: '/api/uploads',
		body: { json: { name: 'a.txt', bytes: 0, purpose: 'evidence' } },
		answers: [422, 422, 403, 403, 403, 401]
	},
	{
		route: '/api/uploads/[id]',
		call: 'DELETE',
		address: `/api/uploads/${NO_ID}`,
		answers: [404, 404, 404, 404, 404, 401]
	},
	{
		route: '/api/uploads/[id]/complete',
		call: 'POST',
		address: `/api/uploads/${NO_ID}/complete`,
		body: { json: {} },
		answers: [404, 404, 403, 403, 403, 401]
	},
	{
		route: '/api/uploads/[id]/parts/[n]',
		call: 'PUT',
		address: `/api/uploads/${NO_ID}/parts/1`,
		body: { json: {} },
		answers: [404, 404, 403, 403, 403, 401]
	},
	{ route: '/api/jobs/[id]', call: 'GET', address: `/api/jobs/${NO_ID}`, answers: [404, 404, 404, 404, 404, 401] },

	{ route: '/(bench)/products', call: 'GET', address: '/products', answers: STAFF },
	{ route: '/(bench)/products/new', call: 'GET', address: '/products/new', answers: [200, 403, 403, 403, 404, 303] },
	{
		route: '/(bench)/products/new',
		call: '?/default',
		address: '/products/new',
		body: {},
		answers: [400, 400, 400, 400, 404, 303]
	},
	{
		route: '/(bench)/products/[slug]',
		call: 'GET',
		address: '/products/pebblewick-kids-wash',
		answers: [303, 303, 404, 303, 404, 303]
	},
	{
		route: '/(bench)/products/[slug]/formula',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/formula',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/composition',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/composition',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/list',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/list',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/list/copy.txt',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/list/copy.txt',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/list/copy.json',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/list/copy.json',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/list/copy.csv',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/list/copy.csv',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/claims',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: '?/add',
		address: `${P}/claims`,
		body: { wording: 'A', kind: 'other' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: '?/answer',
		address: `${P}/claims`,
		body: { claimId: NO_ID, rev: '1', wording: 'A', ...criteria },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: '?/link',
		address: `${P}/claims`,
		body: { claimId: NO_ID, documentId: NO_ID },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: '?/unlink',
		address: `${P}/claims`,
		body: { linkId: NO_ID },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/claims',
		call: '?/withdraw',
		address: `${P}/claims`,
		body: { claimId: NO_ID },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/label',
		answers: PRODUCT
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/begin',
		address: `${P}/label`,
		body: { packId: NO_ID, market: 'EU' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/save',
		address: `${P}/label?copy=${NO_ID}`,
		body: { rev: '1', durability: 'open' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/submit',
		address: `${P}/label`,
		body: { copyId: NO_ID, reason: '' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/approve',
		address: `${P}/label`,
		body: { copyId: NO_ID, reason: '' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/sendBack',
		address: `${P}/label`,
		body: { copyId: NO_ID, comment: 'A' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label',
		call: '?/use',
		address: `${P}/label`,
		body: { copyId: NO_ID, firstBatch: '1', lastBatch: '' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/label/[copyId]/download',
		call: 'GET',
		address: `/products/nightfold-cream/label/${NO_ID}/download`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(bench)/products/[slug]/file',
		call: 'GET',
		address: '/products/pebblewick-kids-wash/file',
		answers: PRODUCT
	},
	{ route: '/(bench)/products/[slug]/file', call: '?/build', address: `${P}/file`, body: {}, answers: OFFICER_CHANGES },
	{
		route: '/(bench)/products/[slug]/file',
		call: '?/decide',
		address: `${P}/file`,
		body: { need: 'a9.effects', applicable: 'false', reason: 'A' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/file',
		call: '?/share',
		address: `${P}/file`,
		body: { number: '1', why: 'A' },
		answers: OFFICER_CHANGES
	},
	{
		route: '/(bench)/products/[slug]/file/[number]',
		call: 'GET',
		address: '/products/nightfold-cream/file/99',
		answers: [404, 404, 404, 404, 404, 303]
	},

	{ route: '/(counter)/counter', call: 'GET', address: '/counter', answers: [404, 404, 404, 404, 303, 303] },
	{
		route: '/(counter)/counter/[slug]',
		call: 'GET',
		address: '/counter/nightfold-cream',
		answers: [404, 404, 404, 404, 200, 303]
	},
	{
		route: '/(counter)/counter/[slug]',
		call: 'GET',
		address: '/counter/tidewell-shampoo',
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(counter)/counter/[slug]',
		call: '?/approve',
		address: '/counter/tidewell-shampoo',
		body: { copyId: NO_ID, contentHash: HASH },
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(counter)/counter/[slug]',
		call: '?/sendBack',
		address: '/counter/tidewell-shampoo',
		body: { copyId: NO_ID, comment: 'A' },
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(counter)/counter/[slug]/copies/[copyId]',
		call: 'GET',
		address: `/counter/nightfold-cream/copies/${NO_ID}`,
		answers: [404, 404, 404, 404, 404, 303]
	},
	{
		route: '/(counter)/counter/[slug]/issues/[number]',
		call: 'GET',
		address: '/counter/nightfold-cream/issues/99',
		answers: [404, 404, 404, 404, 404, 303]
	},

	{ route: '/', call: 'GET', address: '/', answers: [303, 303, 303, 303, 303, 303] },
	{ route: '/(door)/sign-in', call: 'GET', address: '/sign-in', answers: [303, 303, 303, 303, 303, 200] },
	{
		route: '/(door)/sign-in',
		call: '?/signIn',
		address: '/sign-in',
		body: { email: 'no', password: '' },
		answers: [400, 400, 400, 400, 400, 400]
	},
	{ route: '/(door)/reset', call: 'GET', address: '/reset', answers: [200, 200, 200, 200, 200, 200] },
	{
		route: '/(door)/reset',
		call: '?/default',
		address: '/reset',
		body: { email: 'no' },
		answers: [400, 400, 400, 400, 400, 400]
	},
	{
		route: '/(door)/reset/[secret]',
		call: 'GET',
		address: '/reset/no-such-secret',
		answers: [200, 200, 200, 200, 200, 200]
	},
	{
		route: '/(door)/reset/[secret]',
		call: '?/default',
		address: '/reset/no-such-secret',
		body: { password: 'a long enough password' },
		answers: [404, 404, 404, 404, 404, 404]
	},
	{
		route: '/(door)/invitation/[secret]',
		call: 'GET',
		address: '/invitation/no-such-secret',
		answers: [200, 200, 200, 200, 200, 200]
	},
	{
		route: '/(door)/invitation/[secret]',
		call: '?/default',
		address: '/invitation/no-such-secret',
		body: { password: 'a long enough password' },
		answers: [404, 404, 404, 404, 404, 404]
	},
	{ route: '/(door)/account', call: 'GET', address: '/account', answers: [200, 200, 200, 200, 200, 303] },
	{
		route: '/(door)/account',
		call: '?/change',
		address: '/account',
		body: { present: '', next: '' },
		answers: [400, 400, 400, 400, 400, 303]
	},
	{
		route: '/(bench)/people',
		call: '?/mailLink',
		address: '/people',
		body: { personId: NO_ID },
		answers: [403, 403, 403, 404, 404, 303]
	},
	{ route: '/healthz', call: 'GET', address: '/healthz', answers: [200, 200, 200, 200, 200, 200] },
	{
		route: '/preferences',
		call: 'POST',
		address: '/preferences',
		body: { back: '/' },
		answers: [303, 303, 303, 303, 303, 303]
	},
	{
		route: '/api/v1/tokens',
		call: 'POST',
		address: '/api/v1/tokens',
		body: { json: {} },
		answers: [422, 422, 422, 422, 422, 422]
	},
	{
		route: '/api/v1/compute/composition',
		call: 'POST',
		address: '/api/v1/compute/composition',
		body: { json: {} },
		answers: [401, 401, 401, 401, 401, 401]
	},
	{
		route: '/api/v1/compute/batch-sheet',
		call: 'POST',
		address: '/api/v1/compute/batch-sheet',
		body: { json: {} },
		answers: [401, 401, 401, 401, 401, 401]
	},
	{
		route: '/api/v1/compute/lists',
		call: 'POST',
		address: '/api/v1/compute/lists',
		body: { json: {} },
		answers: [401, 401, 401, 401, 401, 401]
	},
	// These two end the sign-in that the rows before them stand on.
	{ route: '/(door)/sign-out', call: 'POST', address: '/sign-out', body: {}, answers: [303, 303, 303, 303, 303, 303] },
	{
		route: '/(door)/account',
		call: '?/everywhere',
		address: '/account',
		body: {},
		answers: [303, 303, 303, 303, 303, 303]
	}
];
