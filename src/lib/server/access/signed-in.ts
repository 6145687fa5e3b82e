import { error } from '@sveltejs/kit';
import type { Actor } from './actor';

/** The actor of a request, once more after the gate of its side: no load or action relies on the gate alone. */
export const signedIn = (locals: { readonly actor: Actor | null }): Actor =>
	locals.actor ?? error(401, { message: 'forbidden', code: 'forbidden' });
