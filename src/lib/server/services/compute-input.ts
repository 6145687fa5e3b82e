import type { CompositionRequest, FormulaLine } from '$lib/domain/composition/types';
import { colourIndexIn } from '$lib/domain/ingredients/colour-names';
import type { SubstanceIdentity } from '$lib/domain/ingredients/types';
import { casFault, ecFault } from '$lib/domain/material/identifiers';
import { substanceKey } from '$lib/domain/material/substance-key';
import type { Constituent, MaterialVersion } from '$lib/domain/material/types';
import { decimalOf } from '$lib/domain/quantity/decimal';
import { LINE_DECIMALS, PART_DECIMALS, type Id, type LineShare, type PartShare } from '$lib/domain/quantity/units';
import type { ComputeInput } from '$lib/schemas/compute';
import type { ProblemEntry } from '../http/answering';
import { Refused } from '../refused';

const canonicalDecimal = (text: string) => text.trim().replace(',', '.');
const part = (text: string | undefined) =>
	text === undefined ? null : (decimalOf(canonicalDecimal(text), PART_DECIMALS) as PartShare);
const line = (text: string | undefined) =>
	text === undefined ? null : (decimalOf(canonicalDecimal(text), LINE_DECIMALS) as LineShare);

type ConstituentInput = ComputeInput['materials'][string]['constituents'][number];

/** @throws Refused 'invalid' for a wrong check digit and for parts of something that the material does not hold. */
export function refuseWrongIdentities(input: Pick<ComputeInput, 'materials'>): void {
	const errors: ProblemEntry[] = [];
	for (const [name, material] of Object.entries(input.materials)) {
		material.constituents.forEach((constituent, index) => {
			const path = `materials.${name}.constituents.${index}`;
			for (const [field, fault] of [
				['cas', constituent.cas === undefined ? null : casFault(constituent.cas)],
				['ec', constituent.ec === undefined ? null : ecFault(constituent.ec)]
			] as const) {
				if (!fault) continue;
				const right = fault.why === 'checkDigit' ? fault.right : undefined;
				const message =
					right === undefined
						? 'This number has the wrong form.'
						: `The check digit is wrong; ${right} would be right.`;
				errors.push({ path: `${path}.${field}`, value: constituent[field], limit: right, message });
			}
			if (constituent.ofWhich !== undefined && parentIndex(material.constituents, constituent) < 0) {
				errors.push({
					path: `${path}.ofWhich`,
					value: constituent.ofWhich,
					message: 'The material has no such constituent.'
				});
			}
		});
	}
	if (errors.length > 0) throw new Refused('invalid', { errors });
}

const parentIndex = (constituents: readonly ConstituentInput[], child: ConstituentInput) =>
	constituents.findIndex(
		(each) =>
			each !== child && each.ofWhich === undefined && substanceKey(each.inci) === substanceKey(child.ofWhich ?? '')
	);

/** @throws Refused 'invalid' when the formula asked for was not sent. */
export function refuseMissingFormula(input: Pick<ComputeInput, 'formula' | 'formulas'>): void {
	if (Object.hasOwn(input.formulas, input.formula)) return;
	const message = 'There is no formula of this name in the call.';
	throw new Refused('invalid', { errors: [{ path: 'formula', value: input.formula, message }] });
}

/** The formula, or each of its shades: the shade's lines lie inside the 100 of the formula, whose q.s. line gives way. */
export function compositionRequestsOf(
	input: ComputeInput
): readonly { readonly name: string | null; readonly request: CompositionRequest }[] {
	const request = compositionRequestOf(input);
	const shades = Object.entries(input.shades ?? {});
	if (shades.length === 0) return [{ name: null, request }];
	return shades.map(([name, lines]) => ({ name, request: withShade(request, name, lines) }));
}

function withShade(
	request: CompositionRequest,
	name: string,
	lines: NonNullable<ComputeInput['shades']>[string]
): CompositionRequest {
	const outer = request.formulas.get(request.formula);
	if (!outer) return request;
	const own = lines.map((each, index) => lineOf(`${name}/`, each, index));
	return {
		...request,
		formulas: new Map([...request.formulas, [request.formula, { ...outer, lines: [...outer.lines, ...own] }]])
	};
}

export function compositionRequestOf(
	input: Pick<ComputeInput, 'formula' | 'formulas' | 'materials'>
): CompositionRequest {
	return {
		formula: input.formula as Id<'formula'>,
		materials: new Map(
			Object.entries(input.materials).map(([name, { constituents }]) => [
				name as Id<'material'>,
				materialOf(name, constituents)
			])
		),
		formulas: new Map(
			Object.entries(input.formulas).map(([name, { lines }]) => [
				name as Id<'formula'>,
				{
					formula: name as Id<'formula'>,
					version: name as Id<'formulaVersion'>,
					lines: lines.map((each, index) => lineOf(name, each, index))
				}
			])
		)
	};
}

const constituentId = (material: string, index: number) => `${material}/${index}` as Id<'constituent'>;

function materialOf(name: string, constituents: readonly ConstituentInput[]): MaterialVersion {
	return {
		id: name as Id<'materialVersion'>,
		material: name as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		contentHash: null,
		constituents: constituents.map((each, index): Constituent => {
			const common = {
				id: constituentId(name, index),
				substance: substanceKey(each.inci) as Id<'substance'>,
				declared: { low: part(each.min), typical: part(each.typical), high: part(each.max), highOpen: false },
				nano: each.nano,
				use: each.use,
				source: null
			};
			if (each.ofWhich === undefined) return { ...common, place: 'inSum', role: each.role };
			return { ...common, place: 'ofWhich', parent: constituentId(name, parentIndex(constituents, each)) };
		})
	};
}

function lineOf(formula: string, each: ComputeInput['formulas'][string]['lines'][number], index: number): FormulaLine {
	const amount = each.qs
		? ({ kind: 'qs' } as const)
		: ({
				kind: 'share',
				min: line(each.min),
				share: line(each.percent) ?? (0n as LineShare),
				max: line(each.max)
			} as const);
	const common = { id: `${formula}#${index}` as Id<'line'>, phase: '', amount };
	return each.material !== undefined
		? { ...common, material: each.material as Id<'material'> }
		: { ...common, formula: each.formula as Id<'formula'> };
}

/** Every substance that was sent, under the first spelling of its name. */
export function substancesOf(input: ComputeInput): ReadonlyMap<Id<'substance'>, SubstanceIdentity> {
	const found = new Map<Id<'substance'>, SubstanceIdentity>();
	for (const { constituents } of Object.values(input.materials)) {
		for (const { inci, cas } of constituents) {
			const key = substanceKey(inci);
			const id = key as Id<'substance'>;
			const known = found.get(id);
			found.set(id, {
				id,
				key,
				inci: known?.inci ?? inci.trim(),
				cas: [...new Set([...(known?.cas ?? []), ...(cas === undefined ? [] : [cas])])],
				colourIndex: colourIndexIn(inci)
			});
		}
	}
	return found;
}
