/** What a field hands to the control inside it, so that label, hint and error belong to it for every reader. */
export interface FieldWiring {
	readonly id: string;
	readonly 'aria-describedby': string | undefined;
	readonly 'aria-invalid': 'true' | undefined;
	readonly required: boolean | undefined;
}

/** Superforms gives a list of sentences; one is enough to act on. */
export const firstError = (error: string | readonly string[] | undefined): string | undefined =>
	typeof error === 'string' ? error : error?.[0];

export const controlLook =
	'w-full rounded border border-edge bg-sheet px-2.5 text-[0.875rem] leading-5 text-ink placeholder:text-ink-soft ' +
	'aria-invalid:border-madder aria-invalid:ring-1 aria-invalid:ring-inset aria-invalid:ring-madder ' +
	'disabled:border-dashed disabled:bg-wash disabled:text-ink-soft';

export const controlHeight = 'h-9 max-mid:h-11';
