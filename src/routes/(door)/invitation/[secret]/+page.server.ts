import { readLinkPage, useLinkPage } from '$lib/server/http/link-page';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ params }) => readLinkPage('invitation', params.secret);

export const actions = {
	default: (event) => useLinkPage('invitation', event.params.secret, event)
} satisfies Actions;
