import { z } from 'zod';

/** The one shape of every refusal of the API. */
export const errorJsonSchema = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    issues: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
    /** With 409 `stale`: the record as it stands now. */
    current: z.unknown().optional(),
    requestId: z.string().optional(),
  }),
});

export type ErrorJson = z.infer<typeof errorJsonSchema>;
export type Issue = { path: string; message: string };
