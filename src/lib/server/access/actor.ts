import { Refused } from '../refused';

export const STAFF_ROLES = ['officer', 'formulator', 'assessor', 'administrator'] as const;
export type StaffRole = (typeof STAFF_ROLES)[number];
export type Role = StaffRole | 'client';
export type DecimalSign = '.' | ',';

/** Who acts. Every service takes the actor first. */
export interface Actor {
	readonly personId: string;
	readonly name: string;
	readonly email: string;
	readonly roles: ReadonlySet<Role>;
	readonly side: 'staff' | 'client' | 'system';
	readonly clientId: string | null;
	readonly decimalSign: DecimalSign;
	readonly singleKeys: boolean;
}

/** The worker and the door act as the system; what they write names the person whose request caused it. */
export const systemActor = (personId: string): Actor => ({
	personId,
	name: 'system',
	email: '',
	roles: new Set(),
	side: 'system',
	clientId: null,
	decimalSign: '.',
	singleKeys: false
});

export const hasRole = (actor: Actor, ...roles: readonly Role[]) => roles.some((role) => actor.roles.has(role));

/** An actor whose staff roles are only the assessor's sees assigned products alone. */
export const seesAssignedOnly = (actor: Actor) =>
	actor.side === 'staff' && actor.roles.has('assessor') && !hasRole(actor, 'officer', 'formulator', 'administrator');

/** @throws Refused 'forbidden' naming the roles that may. */
export function requireRole(actor: Actor, ...roles: readonly Role[]): void {
	if (!hasRole(actor, ...roles)) throw new Refused('forbidden', { roles });
}
