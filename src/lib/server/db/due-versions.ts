import type { Trx } from './with-actor';

/** Remembers a version released for a day to come. */
export async function awaitDay(trx: Trx, versionId: string, due: string, personId: string): Promise<void> {
	await trx
		.insertInto('material_version_due')
		.values({ material_version_id: versionId, due, person_id: personId })
		.execute();
}

export interface DueVersion {
	readonly versionId: string;
	readonly materialId: string;
	readonly tradeName: string;
	readonly number: number;
	readonly personId: string;
}

/** Versions whose day has come, each taken by one caller only; the earliest first. */
export async function takeDueVersion(trx: Trx, day: string): Promise<DueVersion | null> {
	const row = await trx
		.selectFrom('material_version_due')
		.innerJoin('material_version', 'material_version.id', 'material_version_due.material_version_id')
		.innerJoin('material', 'material.id', 'material_version.material_id')
		.select([
			'material_version.id as versionId',
			'material.id as materialId',
			'material.trade_name as tradeName',
			'material_version.number',
			'material_version_due.person_id as personId'
		])
		.where('due', '<=', day)
		.orderBy('due')
		.orderBy('material_version.number')
		.limit(1)
		.forUpdate('material_version_due')
		.skipLocked()
		.executeTakeFirst();
	if (!row) return null;
	await trx.deleteFrom('material_version_due').where('material_version_id', '=', row.versionId).execute();
	return row;
}
