import type { IsoDate } from '$lib/domain/quantity/units';
import { systemActor } from '../access/actor';
import { takeDueVersion } from '../db/due-versions';
import { withActor } from '../db/with-actor';
import { moveProducts } from './moves';

/** Nobody's own rows are read before it is known who released the version. */
const WORKER = systemActor('00000000-0000-7000-8000-000000000000');

/** Carries the versions whose effective day has come to the products that weigh them, each in a transaction of its own. */
export async function moveDueVersions(day: IsoDate): Promise<number> {
	let moved = 0;
	while (await moveNext(day)) moved += 1;
	return moved;
}

const moveNext = (day: IsoDate): Promise<boolean> =>
	withActor(WORKER, async (trx) => {
		const due = await takeDueVersion(trx, day);
		if (!due) return false;
		await moveProducts(trx, systemActor(due.personId), {
			kind: 'material',
			versionId: due.versionId,
			materialId: due.materialId,
			label: `${due.tradeName}, version ${due.number}`
		});
		return true;
	});
