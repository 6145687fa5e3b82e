import { isoDate } from '$lib/domain/quantity/day';
import type { IsoDate } from '$lib/domain/quantity/units';
import { marketSchema, type Market } from '$lib/schemas/market';
import { today } from '../clock';

/** The batch day of an address (?batch=YYYY-MM-DD); today when there is none or no such day. */
export const batchDayOf = (url: URL): IsoDate => isoDate(url.searchParams.get('batch') ?? '') ?? today();

/** The market of an address (?market=US); the EU when there is none or no such market. */
export const marketOf = (url: URL): Market => marketSchema.catch('EU').parse(url.searchParams.get('market'));
