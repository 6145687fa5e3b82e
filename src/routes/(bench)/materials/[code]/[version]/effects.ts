/** What a release did to one live label copy, as the release answers it. */
export interface CopyEffect {
	readonly copyId: string;
	readonly copyNumber: number | null;
	readonly productSlug: string;
	readonly productName: string;
	readonly effect: 'saysSomethingElse' | 'untouched';
}
