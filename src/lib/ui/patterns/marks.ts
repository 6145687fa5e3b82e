import type { IconName } from '../primitives/icons';
import type { Tone } from '../primitives/tone';

/** Shapes and their tones. The word is never left out; it comes from the texts or from the one who knows more. */
interface Shape {
	readonly icon: IconName;
	readonly tone: Tone;
}

export type Readiness = 'notBegun' | 'incomplete' | 'ready' | 'outOfDate' | 'beingRechecked';

export const READINESS: Record<Readiness, Shape> = {
	notBegun: { icon: 'leafNotBegun', tone: 'idle' },
	incomplete: { icon: 'leafIncomplete', tone: 'warn' },
	ready: { icon: 'leafReady', tone: 'ok' },
	outOfDate: { icon: 'leafOutOfDate', tone: 'info' },
	beingRechecked: { icon: 'leafBeingRechecked', tone: 'idle' }
};

export type Finding =
	| 'within'
	| 'exceeds'
	| 'cannotTellYet'
	| 'notPermitted'
	| 'trace'
	| 'labelDuty'
	| 'changesOn'
	| 'readTheEntry'
	| 'notInRuleBook';

export const FINDINGS: Record<Finding, Shape> = {
	within: { icon: 'within', tone: 'ok' },
	exceeds: { icon: 'exceeds', tone: 'bad' },
	cannotTellYet: { icon: 'cannotTellYet', tone: 'warn' },
	notPermitted: { icon: 'notPermitted', tone: 'bad' },
	trace: { icon: 'trace', tone: 'warn' },
	labelDuty: { icon: 'labelDuty', tone: 'info' },
	changesOn: { icon: 'changesOn', tone: 'info' },
	readTheEntry: { icon: 'readTheEntry', tone: 'warn' },
	notInRuleBook: { icon: 'notInRuleBook', tone: 'warn' }
};

export type Answer = 'given' | 'earlier' | 'missing';

export const ANSWERS: Record<Answer, Shape> = {
	given: { icon: 'given', tone: 'ok' },
	earlier: { icon: 'earlier', tone: 'info' },
	missing: { icon: 'missing', tone: 'warn' }
};

export type Verdict = 'supported' | 'conditional' | 'notYet' | 'contradicted' | 'notAllowed';

export const VERDICTS: Record<Verdict, Shape> = {
	supported: { icon: 'supported', tone: 'ok' },
	conditional: { icon: 'conditional', tone: 'ok' },
	notYet: { icon: 'notYet', tone: 'warn' },
	contradicted: { icon: 'contradicted', tone: 'bad' },
	notAllowed: { icon: 'notPermitted', tone: 'bad' }
};

/** Between two lines of the list: how sure their order is. */
export type Rung = 'certain' | 'restsOnTypical' | 'undecided' | 'free';
