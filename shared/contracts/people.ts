/** People, sessions and roles. */
import { z } from 'zod';

export const ROLES = ['reader', 'modeler', 'referee', 'editor'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('Write an address such as name@example.org.'));
export const passwordSchema = z
  .string()
  .min(12, 'Use at least 12 characters.')
  .max(200, 'Use at most 200 characters.');
export const nameSchema = z
  .string()
  .trim()
  .min(1, 'Write a name.')
  .max(120, 'Use at most 120 characters.');

export const signInSchema = z.object({
  email: emailSchema,
  password: z.string().min(1, 'Write the password.').max(200),
});
export type SignIn = z.infer<typeof signInSchema>;

export const registrationSchema = z.object({
  name: nameSchema,
  email: emailSchema,
  password: passwordSchema,
});
export type Registration = z.infer<typeof registrationSchema>;

export const passwordResetRequestSchema = z.object({ email: emailSchema });
export const passwordResetSchema = z.object({ password: passwordSchema });
export const emailConfirmationSchema = z.object({ token: z.string().min(20).max(200) });

export const personSchema = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string().nullable(),
});
export type Person = z.infer<typeof personSchema>;

/** GET /api/session; also the answer to signing in. */
export const sessionSchema = z.object({
  person: personSchema.nullable(),
  /** To be sent as `X-CSRF-Token` with every request that changes something. */
  csrfToken: z.string(),
  groups: z.array(z.object({ id: z.string(), name: z.string(), role: roleSchema })),
  /** True where a local stand-in answers for GitHub; the sign-in page says so. */
  identityProviderIsLocal: z.boolean(),
});
export type Session = z.infer<typeof sessionSchema>;
