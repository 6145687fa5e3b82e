import { error, redirect } from '@sveltejs/kit';
import { z } from 'zod';
import { config } from '$lib/server/config';
import { savePreferences } from '$lib/server/services/preferences';
import type { RequestHandler } from './$types';

const preferenceSchema = z.object({
	theme: z.enum(['light', 'dark', 'system']).optional(),
	decimalSign: z.enum(['.', ',']).optional(),
	singleKeys: z.enum(['on', 'off']).optional(),
	back: z
		.string()
		.regex(/^\/(?!\/)/)
		.default('/')
});

const ONE_YEAR_S = 365 * 24 * 60 * 60;

/** Works without script: a form posts one preference and comes back to its page. */
export const POST: RequestHandler = async ({ request, cookies, locals }) => {
	const parsed = preferenceSchema.safeParse(Object.fromEntries(await request.formData()));
	if (!parsed.success) error(422, { message: 'invalid', code: 'invalid' });
	const { theme, decimalSign, singleKeys, back } = parsed.data;
	if (theme === 'system') cookies.delete('theme', { path: '/' });
	else if (theme) {
		cookies.set('theme', theme, { path: '/', maxAge: ONE_YEAR_S, sameSite: 'lax', secure: config().secureCookies });
	}
	if (locals.actor && (decimalSign || singleKeys)) {
		await savePreferences(locals.actor, { decimalSign, singleKeys: singleKeys && singleKeys === 'on' });
	}
	redirect(303, back);
};
