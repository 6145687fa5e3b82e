import { z } from 'zod';

export const PAGE_SIZE = 50;

/** What every list's address may carry; anything else falls back rather than failing a bookmarked page. */
export const listQuerySchema = z.object({
	q: z.string().trim().max(200).catch(''),
	page: z.coerce.number().int().min(1).max(10_000).catch(1),
	sort: z.string().max(40).catch(''),
	dir: z.enum(['asc', 'desc']).catch('asc')
});
export type ListQuery = z.infer<typeof listQuerySchema>;

export const listQueryOf = (params: URLSearchParams): ListQuery =>
	listQuerySchema.parse({
		q: params.get('q') ?? '',
		page: params.get('page') ?? 1,
		sort: params.get('sort') ?? '',
		dir: params.get('dir') ?? 'asc'
	});

export interface Page<T> {
	readonly rows: readonly T[];
	readonly total: number;
	readonly page: number;
	readonly pageSize: number;
}
