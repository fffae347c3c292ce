import type { customerSampleSchema } from '@shared/schemas/sample';
import type { Stage } from '@shared/schemas/stage';
import type { z } from 'zod';
import type { Context } from '../context';
import { Sample } from '../models/Sample';
import { Study } from '../models/Study';
import { withProgress } from './loadStudy';

/** The stage in the customer's words: no settings, no numbers before they are released. */
const WORDS: Record<Stage, string> = {
  brief: 'The question is being written down.',
  matrix: 'The experiment is being planned.',
  bench: 'The runs are being done.',
  fit: 'The results are being analysed.',
  map: 'The results are being analysed.',
  release: 'The settings are being checked before they are signed.',
};

/** A customer's own samples, with how far the work on each is. */
export async function samplesOfCustomer(
  ctx: Context,
): Promise<z.input<typeof customerSampleSchema>[]> {
  const { actor, transaction } = ctx;
  const { labId, customerId } = actor;
  if (customerId === null) return [];
  const samples = await Sample.findAll({
    where: { labId, customerId },
    order: [['id', 'DESC']],
    transaction,
  });
  const studies = await Study.findAll({
    where: { labId, sampleId: samples.map(({ id }) => id) },
    order: [['id', 'ASC']],
    transaction,
  });
  const loaded = await withProgress(studies, ctx);
  return samples.map((sample) => ({
    id: sample.id,
    code: sample.code,
    name: sample.name,
    material: sample.material,
    receivedOn: sample.receivedOn,
    receivedMassG: sample.receivedMassG,
    studies: loaded
      .filter(({ study }) => study.sampleId === sample.id)
      .map(({ study, progress }) => ({
        code: study.code,
        title: study.title,
        stage: progress.stage,
        isSigned: progress.releasedAt !== null,
        words: progress.releasedAt ? 'The settings are signed.' : WORDS[progress.stage],
      })),
  }));
}
