import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema } from './identity';

/** One event of the audit trail: who did what to which record, when, with the fields before and after. */
export const auditEventJsonSchema = z.object({
  id: idSchema,
  at: momentSchema,
  by: byLineSchema.nullable(),
  noun: z.string(),
  nounId: idSchema.nullable(),
  action: z.string(),
  before: z.record(z.string(), z.unknown()).nullable(),
  after: z.record(z.string(), z.unknown()).nullable(),
  why: z.string().nullable(),
});
export type AuditEventJson = z.infer<typeof auditEventJsonSchema>;
