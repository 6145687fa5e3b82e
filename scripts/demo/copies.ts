import type { Actor } from '../../src/lib/server/access/actor';
import { copyById } from '../../src/lib/server/db/copies';
import { packsOf, productBySlug } from '../../src/lib/server/db/products';
import { withActor } from '../../src/lib/server/db/with-actor';
import { draftOf, type CopyDraft } from '../../src/lib/schemas/label-copy';
import {
	approveAsClient,
	approveForLaboratory,
	createCopy,
	putCopyInUse,
	saveCopy,
	sendBackCopy,
	submitCopy
} from '../../src/lib/server/services/copies';

export interface CopyActors {
	readonly officer: Actor;
	readonly pell: Actor;
	readonly quay: Actor;
}

type Words = Partial<CopyDraft>;
const CREAM: Words = {
	directions: 'Smooth over clean face and neck in the evening. Avoid the eye area.',
	durability: 'periodAfterOpening',
	months: '12',
	eMark: true
};
const SHAMPOO: Words = {
	directions: 'Work into wet hair, then rinse well. Avoid contact with eyes.',
	durability: 'periodAfterOpening',
	months: '12',
	eMark: true
};
const WASH: Words = {
	directions: 'Pour a little onto a wet hand, wash and rinse well. For use under supervision of an adult.',
	durability: 'bestBefore',
	months: '24',
	eMark: true
};

const stored = (actor: Actor, slug: string, id: string) =>
	withActor(actor, async (trx) => copyById(trx, (await productBySlug(trx, slug)).id, id));

async function written(officer: Actor, slug: string, words: Words): Promise<string> {
	const packId = await withActor(officer, async (trx) => {
		const product = await productBySlug(trx, slug);
		return (await packsOf(trx, product.id))[0]?.id ?? '';
	});
	const id = await createCopy(officer, slug, packId, 'EU');
	const { content, rev } = await stored(officer, slug, id);
	await saveCopy(officer, slug, id, { ...draftOf(rev, content), ...words });
	return id;
}

async function submitted(officer: Actor, slug: string, words: Words): Promise<string> {
	const id = await written(officer, slug, words);
	await submitCopy(officer, slug, id, '');
	return id;
}

async function approved(officer: Actor, slug: string, words: Words): Promise<string> {
	const id = await submitted(officer, slug, words);
	await approveForLaboratory(officer, slug, id, '');
	return id;
}

async function approvedByClient(officer: Actor, client: Actor, slug: string, words: Words): Promise<string> {
	const id = await approved(officer, slug, words);
	const { contentHash } = await stored(client, slug, id);
	await approveAsClient(client, slug, id, contentHash ?? '');
	return id;
}

/** One label copy in each state, as the days of a laboratory leave them. */
export async function seedCopies({ officer, pell, quay }: CopyActors): Promise<void> {
	const cream = 'nightfold-cream';
	const first = await approvedByClient(officer, pell, cream, { ...CREAM, months: '6' });
	await putCopyInUse(officer, cream, { copyId: first, firstBatch: '26-031', lastBatch: '' });
	const second = await approvedByClient(officer, pell, cream, CREAM);
	await putCopyInUse(officer, cream, { copyId: second, firstBatch: '26-118', lastBatch: '26-117' });
	const third = await submitted(officer, cream, {
		...CREAM,
		directions: `${CREAM.directions} Close the jar after use.`
	});
	await sendBackCopy(officer, cream, third, 'Say in the directions how much is used.');

	const shampoo = 'tidewell-shampoo';
	await approvedByClient(officer, quay, shampoo, SHAMPOO);
	await approved(officer, shampoo, { ...SHAMPOO, months: '9' });

	await submitted(officer, 'pebblewick-kids-wash', WASH);
}
