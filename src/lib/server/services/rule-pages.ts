import { allRules, idOf, RULE_BOOK_NAME, ruleById } from '$lib/reference';
import { PAGE_SIZE, type ListQuery, type Page } from '$lib/schemas/paging';
import type { RuleText } from '$lib/schemas/reference';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { Refused } from '../refused';

export interface RulesView {
	readonly name: string;
	readonly all: number;
	readonly page: Page<RuleText & { readonly id: string }>;
}

/** The rule reference ships with the application; it is searched where it stands. */
export function readRules(actor: Actor, query: ListQuery): RulesView {
	requireAct(actor, 'readLaboratory');
	const words = query.q.toLowerCase();
	const found = allRules().filter(({ citation, title, text }) =>
		`${citation} ${title} ${text}`.toLowerCase().includes(words)
	);
	const from = (query.page - 1) * PAGE_SIZE;
	const rows = found.slice(from, from + PAGE_SIZE).map((rule) => ({ ...rule, id: idOf(rule) }));
	return {
		name: RULE_BOOK_NAME,
		all: allRules().length,
		page: { rows, total: found.length, page: query.page, pageSize: PAGE_SIZE }
	};
}

/** @throws Refused 'not-found'. */
export function readRule(actor: Actor, act: string, entry: string): RuleText {
	requireAct(actor, 'readLaboratory');
	const rule = ruleById(`${act}/${entry}`);
	if (!rule) throw new Refused('not-found');
	return rule;
}
