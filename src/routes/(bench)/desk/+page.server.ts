import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readDesk } from '$lib/server/services/desk';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals }) => orError(() => readDesk(signedIn(locals)));
