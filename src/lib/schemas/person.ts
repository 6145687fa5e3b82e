import { z } from 'zod';

export const STAFF_ROLE_NAMES = ['officer', 'formulator', 'assessor', 'administrator'] as const;
export type StaffRole = (typeof STAFF_ROLE_NAMES)[number];
const PASSWORD = { min: 12, max: 200 } as const;
const newPassword = z.string().min(PASSWORD.min).max(PASSWORD.max);

export const newPasswordSchema = z.object({ password: newPassword.default('') });
export const resetSchema = z.object({ email: z.email().max(254).default('') });
export const changePasswordSchema = z.object({
	present: z.string().min(1).max(PASSWORD.max).default(''),
	next: newPassword.default('')
});
export const inviteSchema = z.object({ personId: z.uuid() });

export const clientSchema = z.object({ clientName: z.string().trim().min(1).max(200).default('') });

/** A person is staff with one or more roles, or belongs to one client; never both. */
export const personSchema = z
	.object({
		name: z.string().trim().min(1).max(200).default(''),
		email: z.email().max(254).default(''),
		/** Empty: the person chooses one by the link of the invitation. */
		password: newPassword.or(z.literal('')).default(''),
		roles: z.array(z.enum(STAFF_ROLE_NAMES)).default([]),
		clientId: z.uuid().or(z.literal('')).default('')
	})
	.superRefine((person, ctx) => {
		if (person.roles.length > 0 === (person.clientId !== '')) {
			ctx.addIssue({ code: 'custom', path: ['clientId'], message: 'staff-or-client' });
		}
	});
export type PersonInput = z.infer<typeof personSchema>;
