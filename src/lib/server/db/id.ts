import { uuidv7 } from 'uuidv7';
import type { Id } from '$lib/domain/quantity/units';

/** A new id, ordered by time so that indexes grow at one end. */
export const newId = <K extends string>() => uuidv7() as Id<K>;
