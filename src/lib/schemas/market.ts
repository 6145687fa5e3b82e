import { z } from 'zod';
import { MARKETS, type Market } from '../domain/ingredients/types';

export { MARKETS, type Market };
export const marketSchema = z.enum(MARKETS);
