/** Why a service refuses. Each code has one status (http/answering.ts) and one sentence (ui/text, errors). */
export type RefusalCode =
	| 'not-found'
	| 'forbidden'
	| 'invalid'
	| 'conflict'
	| 'exists'
	| 'frozen'
	| 'blocked'
	| 'wrong-state'
	| 'too-many-attempts'
	| 'wrong-credentials'
	| 'file-too-large'
	| 'file-empty'
	| 'upload-broken'
	| 'kind-not-taken';

export type RefusalData = Readonly<Record<string, unknown>>;

/** Thrown by services; nothing before it in the same transaction is committed. */
export class Refused extends Error {
	constructor(
		readonly code: RefusalCode,
		readonly data: RefusalData = {}
	) {
		super(code);
		this.name = 'Refused';
	}
}
