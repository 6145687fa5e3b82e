import { redirect } from '@sveltejs/kit';
import { homeOf } from '$lib/server/access/home';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals }) => redirect(303, locals.actor ? homeOf(locals.actor) : '/sign-in');
