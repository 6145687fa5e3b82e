import { requireRole, type Actor, type Role } from './actor';

/** Who may do what; the table of product.md, "act | who". Every service asks here, by name. */
const ACTS = {
	readLaboratory: ['officer', 'formulator', 'assessor', 'administrator'],
	editMaterial: ['officer', 'formulator'],
	releaseMaterial: ['officer', 'formulator'],
	editFormula: ['officer', 'formulator'],
	releaseFormula: ['officer', 'formulator'],
	editProduct: ['officer'],
	attachDocument: ['officer', 'formulator'],
	editCopy: ['officer'],
	submitCopy: ['officer'],
	approveCopyForLaboratory: ['officer'],
	putCopyInUse: ['officer'],
	approveCopyAsClient: ['client'],
	editClaim: ['officer'],
	setNeedNotApplicable: ['officer'],
	buildFile: ['officer'],
	shareFile: ['officer'],
	managePeople: ['administrator']
} as const satisfies Record<string, readonly Role[]>;

export type Act = keyof typeof ACTS;

/** @throws Refused 'forbidden'. */
export const requireAct = (actor: Actor, act: Act) => requireRole(actor, ...ACTS[act]);

export const may = (actor: Actor, act: Act): boolean => ACTS[act].some((role) => actor.roles.has(role));
