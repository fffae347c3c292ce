import { z } from 'zod';

/** The stations of a study, in their order. */
export const STAGES = ['brief', 'matrix', 'bench', 'fit', 'map', 'release'] as const;
export const stageSchema = z.enum(STAGES);
export type Stage = z.infer<typeof stageSchema>;
