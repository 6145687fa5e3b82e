/** What a colour may agree with. A tone never stands alone: a shape or a word says the same. */
export type Tone = 'idle' | 'ok' | 'warn' | 'bad' | 'info';

export const toneText: Record<Tone, string> = {
	idle: 'text-ink-soft',
	ok: 'text-leaf',
	warn: 'text-tansy',
	bad: 'text-madder',
	info: 'text-woad'
};

export const toneGround: Record<Tone, string> = {
	idle: 'bg-wash text-ink-soft ring-1 ring-inset ring-rule',
	ok: 'bg-leaf-tint text-leaf',
	warn: 'bg-tansy-tint text-tansy',
	bad: 'bg-madder-tint text-madder',
	info: 'bg-woad-tint text-woad'
};

export const toneEdge: Record<Tone, string> = {
	idle: 'border-edge',
	ok: 'border-leaf',
	warn: 'border-tansy',
	bad: 'border-madder',
	info: 'border-woad'
};
