/** One formula of a family: the base itself, or a formula that takes it in as a bulk. */
export interface FamilyColumn {
	readonly code: string;
	readonly name: string;
	readonly number: number;
	readonly clients: readonly string[];
	/** Share of the base in it, exact %; null for the base itself. */
	readonly baseShare: string | null;
	/** The version of the base that it is pinned to; null when it follows. */
	readonly pinned: number | null;
}
/** A substance or material over the whole family; figures are exact % or null where it holds none. */
export interface FamilyRow {
	readonly key: string;
	readonly name: string;
	readonly inBase: boolean;
	/** By column: now, and with the base's draft in place. */
	readonly now: readonly (string | null)[];
	readonly then: readonly (string | null)[];
}
export interface FamilyView {
	readonly base: FamilyColumn;
	readonly draft: number | null;
	readonly columns: readonly FamilyColumn[];
	readonly byIngredient: readonly FamilyRow[];
	readonly byMaterial: readonly FamilyRow[];
}
/** What releasing a draft would do to one product. */
export interface ProductImpact {
	readonly slug: string;
	readonly name: string;
	readonly client: string;
	readonly formulaName: string;
	readonly before: string;
	readonly after: string;
	readonly moves: boolean;
	readonly copies: readonly { readonly number: number | null; readonly state: string; readonly moves: boolean }[];
}
export interface ImpactView {
	readonly number: number;
	/** Formulas that take this one in: those that follow it move with it. */
	readonly variants: readonly { readonly name: string; readonly pinned: number | null }[];
	readonly products: readonly ProductImpact[];
}
