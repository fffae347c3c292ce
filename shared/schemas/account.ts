import { z } from 'zod';
import { idSchema, momentSchema, versionSchema } from './identity';
import { emailSchema, lineSchema, newPasswordSchema } from './text';

export const ROLES = ['researcher', 'operator', 'analyst', 'lead', 'customer', 'admin'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

const rolesSchema = z
  .array(roleSchema)
  .min(1, 'Choose at least one role.')
  .refine((roles) => new Set(roles).size === roles.length, 'A role is named twice.')
  .refine((roles) => !roles.includes('customer') || roles.length === 1, {
    error: 'A customer sees only released work, so this role stands alone.',
  });

/** The signed-in person, as the page knows them. */
export const userJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  roles: z.array(roleSchema),
  lab: z.object({
    id: idSchema,
    name: z.string(),
    twoPersonRule: z.boolean(),
    isDemo: z.boolean(),
  }),
  customer: z.object({ id: idSchema, name: z.string() }).nullable(),
});
export type UserJson = z.infer<typeof userJsonSchema>;

export const signInInputSchema = z.strictObject({
  email: z.string().max(300),
  password: z.string().max(1000),
});
export const sessionJsonSchema = z.object({ accessToken: z.string(), user: userJsonSchema });

export const personInputSchema = z
  .strictObject({
    name: lineSchema('A name'),
    email: emailSchema,
    roles: rolesSchema,
    customerId: idSchema.nullable().default(null),
  })
  .superRefine((person, ctx) => {
    if (person.roles.includes('customer') !== (person.customerId !== null))
      ctx.addIssue({
        code: 'custom',
        path: ['customerId'],
        message: 'Choose the customer that this person belongs to; only customers have one.',
      });
  });
export type PersonInput = z.infer<typeof personInputSchema>;

export const personUpdateSchema = z.strictObject({
  roles: rolesSchema,
  isActive: z.boolean(),
  version: versionSchema,
});

export const personJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  roles: z.array(roleSchema),
  customerId: idSchema.nullable(),
  isActive: z.boolean(),
  hasPassword: z.boolean(),
  version: versionSchema,
});
export type PersonJson = z.infer<typeof personJsonSchema>;

/** The one-time address by which an invited person chooses a password. Shown once, stored hashed. */
export const invitationJsonSchema = z.object({
  person: personJsonSchema,
  address: z.string(),
  expiresAt: momentSchema,
});
export const invitationSubjectSchema = z.object({
  name: z.string(),
  email: z.string(),
  labName: z.string(),
});

export const acceptInvitationSchema = z.strictObject({
  token: z.string().min(20).max(200),
  password: newPasswordSchema,
});

export const labInputSchema = z.strictObject({
  twoPersonRule: z.boolean(),
  version: versionSchema,
});
export const labJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  twoPersonRule: z.boolean(),
  version: versionSchema,
});

export const customerInputSchema = z.strictObject({ name: lineSchema('The customer’s name') });
export const customerJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  version: versionSchema,
});
export type CustomerJson = z.infer<typeof customerJsonSchema>;
