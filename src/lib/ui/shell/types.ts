import type { ProductPart } from '../paths';
import type { Readiness } from '../patterns/marks';
import type { DecimalSign, Language } from '../text';

/** What the root layout's load gives every page. */
export interface RootData {
	readonly language: Language;
	readonly theme: 'light' | 'dark' | 'system';
	readonly decimalSign: DecimalSign;
}

export type RoleName = 'officer' | 'formulator' | 'assessor' | 'administrator' | 'client';

/** The product whose contents the spine shows. A page's load may give it as `spineProduct`, over the shell's own. */
export interface SpineProduct {
	readonly slug: string;
	readonly name: string;
	/** Under the name: client and pack, then use, as in "Pell & Fennick · 50 ml jar". */
	readonly lines: readonly string[];
	/** Readiness of the parts that are known; `word` says more than the state, as in "7 of 10 sections". */
	readonly parts: Partial<Record<ProductPart, { readonly state: Readiness; readonly word?: string }>>;
}

export type WorkspacePlace = 'desk' | 'products' | 'materials' | 'formulas' | 'evidence' | 'rules' | 'people';

/** `data.shell` of the bench's layout. */
export interface ShellData {
	readonly person: { readonly name: string; readonly email: string };
	readonly roles: readonly RoleName[];
	readonly singleKeys: boolean;
	readonly workspace: {
		readonly name: string;
		/** Under the name, as in "3 clients, 6 products". */
		readonly lines?: readonly string[];
		/** Beside the places, as in "41". */
		readonly words?: Partial<Record<WorkspacePlace, string>>;
	};
	readonly product?: SpineProduct | null;
}

/** `data.shell` of the client's layout. */
export interface CounterData {
	readonly person: { readonly name: string; readonly email: string };
	readonly client: string;
	readonly workspace: { readonly name: string };
	readonly products: readonly { readonly slug: string; readonly name: string }[];
}
