import { z } from 'zod';

export const signInSchema = z.object({
	email: z.email().max(254).default(''),
	password: z.string().min(1).max(200).default('')
});
