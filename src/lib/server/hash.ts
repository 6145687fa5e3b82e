import { createHash } from 'node:crypto';
import { canonicalText } from '$lib/domain/change/canonical';
import type { Sha256 } from '$lib/domain/quantity/units';

export const sha256 = (text: string | Uint8Array) => createHash('sha256').update(text).digest('hex') as Sha256;

/** The hash under which a content is approved, signed or found again. */
export const contentHash = (content: unknown) => sha256(canonicalText(content));
