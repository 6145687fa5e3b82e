import { faulty, good, type Id, type Outcome } from '../quantity/units';
import type { CompositionFault, CompositionRequest, FormulaVersionLines } from './types';

/** One weighing of one material: the lines that lead to it, from the outer formula inwards. */
export interface Leaf {
	readonly path: readonly Id<'line'>[];
	readonly formulas: readonly Id<'formula'>[];
	readonly material: Id<'material'>;
}
export interface Expanded {
	readonly leaves: readonly Leaf[];
	/** Every formula of the tree, once. */
	readonly formulas: readonly FormulaVersionLines[];
	/** How deep bulks stand in bulks; 0 when every line is a material. */
	readonly levels: number;
}

/** Follows every line down to materials; a formula that contains itself is a fault that names the path. */
export function expand(request: CompositionRequest): Outcome<Expanded, CompositionFault> {
	const leaves: Leaf[] = [];
	const faults: CompositionFault[] = [];
	const seen = new Map<Id<'formula'>, FormulaVersionLines>();

	const visit = (formula: Id<'formula'>, path: readonly Id<'line'>[], above: readonly Id<'formula'>[]): void => {
		if (above.includes(formula)) {
			faults.push({ kind: 'cycle', path: [...above.slice(above.indexOf(formula)), formula] });
			return;
		}
		const version = request.formulas.get(formula);
		if (!version) {
			faults.push({ kind: 'formulaMissing', formula });
			return;
		}
		seen.set(formula, version);
		const formulas = [...above, formula];
		for (const line of version.lines) {
			if (line.formula !== undefined) visit(line.formula, [...path, line.id], formulas);
			else leaves.push({ path: [...path, line.id], formulas, material: line.material });
		}
	};

	visit(request.formula, [], []);
	if (faults.length > 0) return faulty(...faults);
	const levels = leaves.reduce((deepest, leaf) => Math.max(deepest, leaf.path.length - 1), 0);
	return good({ leaves, formulas: [...seen.values()], levels });
}
