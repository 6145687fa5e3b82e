import type { Actor } from './actor';

/** Where a person lands after signing in. */
export const homeOf = (actor: Actor) => (actor.side === 'client' ? '/counter' : '/desk');
