import type { StaffRole } from '../../src/lib/server/access/actor';

export interface DemoPerson {
	readonly name: string;
	readonly email: string;
	readonly roles: readonly StaffRole[];
	readonly client?: string;
}

export const DEMO_CLIENTS = ['Pell & Fennick', 'Harrow Quay', 'Marlpit Nursery'] as const;

/** Invented people; every address is under a domain that exists nowhere. */
export const DEMO_PEOPLE: readonly DemoPerson[] = [
	{ name: 'Ines Marlow', email: 'ines.marlow@wendmoor.example', roles: ['officer'] },
	{ name: 'Tobias Renn', email: 'tobias.renn@wendmoor.example', roles: ['formulator'] },
	{ name: 'Agathe Solheim', email: 'agathe.solheim@wendmoor.example', roles: ['assessor'] },
	{ name: 'Orla Kist', email: 'orla.kist@wendmoor.example', roles: ['administrator'] },
	{ name: 'Clara Pell', email: 'clara.pell@pell-fennick.example', roles: [], client: 'Pell & Fennick' },
	{ name: 'Jonas Quay', email: 'jonas.quay@harrow-quay.example', roles: [], client: 'Harrow Quay' }
];

export const DEMO_PASSWORD = 'pressed-between-pages';
