import { copyElements } from '$lib/domain/label/elements';
import { changedElements } from '$lib/domain/label/forms';
import type { ApprovalView, CounterCopy, CounterProductView, EffectView } from '$lib/schemas/copy-view';
import type { Actor } from '../access/actor';
import { requireRole } from '../access/actor';
import { approvalsOf, copiesOf, effectsOf, headOf, type CopyRow } from '../db/copies';
import { issuesOf } from '../db/issues';
import { packsOf, productBySlug } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { bucket } from '../storage/bucket';
import { SHOWN_TO_CLIENT } from './copies';
import { WORDS } from './copy-standing';

export interface CounterProduct {
	readonly slug: string;
	readonly name: string;
}
export interface CounterView {
	readonly client: string;
	readonly products: readonly CounterProduct[];
}

/** A client's own products; nobody learns of another's. */
export function readCounter(actor: Actor): Promise<CounterView> {
	requireRole(actor, 'client');
	return withActor(actor, async (trx) => {
		const client = await trx.selectFrom('client').select('name').executeTakeFirst();
		const products = await trx.selectFrom('product').select(['slug', 'name']).orderBy('name').execute();
		return { client: client?.name ?? '', products };
	});
}

/**
 * The three questions about one product: what is needed, what is approved, what changed.
 * @throws Refused 'not-found', for another client's product as for none.
 */
export function readCounterProduct(actor: Actor, slug: string): Promise<CounterProductView> {
	requireRole(actor, 'client');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const copies = await shownCopies(trx, await copiesOf(trx, product.id));
		const waiting = copies.filter(({ state }) => state === 'approvedByLaboratory');
		const stands = (copy: CounterCopy) => !copy.outOfDate && !copy.beingRechecked;
		return {
			slug,
			name: product.name,
			functionText: product.functionText,
			packs: await packsOf(trx, product.id),
			needs: waiting.filter(stands),
			corrected: waiting.filter((copy) => !stands(copy)),
			approved: copies.filter(
				({ state, overtaken }) => (state === 'approvedByClient' && !overtaken) || state === 'inUse'
			),
			sentBack: copies.filter(({ state }) => state === 'sentBack'),
			issues: await issuesOf(trx, product.id)
		};
	});
}

async function shownCopies(trx: Trx, rows: readonly CopyRow[]): Promise<CounterCopy[]> {
	const shown = rows.filter(({ state, number }) => number !== null && [...SHOWN_TO_CLIENT, 'sentBack'].includes(state));
	const ids = shown.map(({ id }) => id);
	const approvals = await approvalsOf(trx, ids);
	const effects = await effectsOf(trx, ids);
	return shown
		.map((row) => counterCopy(row, shown, approvals.get(row.id) ?? [], effects.get(row.id) ?? []))
		.filter((copy) => copy.state !== 'sentBack' || copy.approvals.some(({ role }) => role === 'client'));
}

function counterCopy(
	row: CopyRow,
	all: readonly CopyRow[],
	approvals: readonly ApprovalView[],
	effects: readonly EffectView[]
): CounterCopy {
	const earlier = before(row, all);
	return {
		...headOf(row),
		content: row.content,
		elements: copyElements(row.content, WORDS),
		approvals: approvals.map((approval) => (approval.role === 'officer' ? { ...approval, comment: null } : approval)),
		// A cause names a supplier's material; the client learns its kind.
		effects: effects.map((effect) => ({ ...effect, cause: null })),
		changes: earlier && changedElements(earlier.content, row.content, WORDS),
		changedFrom: earlier?.number ?? null
	};
}

const WAS_APPROVED = ['approvedByClient', 'inUse', 'superseded'];

/** The copy of the same pack and market that this client approved before; `all` stands newest first. */
const before = (row: CopyRow, all: readonly CopyRow[]): CopyRow | null =>
	all.find(
		(each) =>
			each.packId === row.packId &&
			each.market === row.market &&
			WAS_APPROVED.includes(each.state) &&
			(each.number ?? 0) < (row.number ?? 0)
	) ?? null;

const DOWNLOAD_SECONDS = 60;

/** Where a shared file is fetched. @throws Refused 'not-found' for one that was not shared with this client. */
export async function sharedIssueAddress(actor: Actor, slug: string, number: number): Promise<string> {
	requireRole(actor, 'client');
	const { issue, product } = await withActor(actor, async (trx) => {
		const found = await productBySlug(trx, slug);
		const issues = await issuesOf(trx, found.id);
		return { product: found, issue: issues.find((each) => each.number === number && each.shared) };
	});
	if (!issue) throw new Refused('not-found');
	const parts = [product.clientName, product.name, `product file ${number}`, issue.date.slice(0, 10)];
	return bucket().signedDownload(issue.sha256, {
		fileName: `${parts.map((part) => part.replace(/[_\s]+/g, '-')).join('_')}.pdf`,
		mediaType: 'application/pdf',
		disposition: 'attachment',
		seconds: DOWNLOAD_SECONDS
	});
}
