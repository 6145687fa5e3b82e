import type { IsoDate } from '$lib/domain/quantity/units';

/** The calendar day in UTC; the core never asks for it. */
export const today = (): IsoDate => new Date().toISOString().slice(0, 10) as IsoDate;
