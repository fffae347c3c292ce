import type { SampleInput } from '@shared/schemas/sample';
import type { Context } from '../context';
import { notFound } from '../errors';
import { Counter } from '../models/Counter';
import { Customer } from '../models/Customer';
import { Sample } from '../models/Sample';
import { StockEntry } from '../models/StockEntry';

/** Writes a sample down with its number, and opens its ledger with the mass received. */
export async function registerSample(
  input: SampleInput,
  ctx: Context,
  { isSimulated = false } = {},
): Promise<Sample> {
  const { actor, transaction } = ctx;
  const { labId } = actor;
  const { found: _found, screened: _screened, customerId, ...fields } = input;
  if (customerId !== null) {
    const customer = await Customer.findOne({ where: { id: customerId, labId }, transaction });
    if (!customer) throw notFound('customer');
  }
  const number = await Counter.next(labId, 'sample', transaction);
  const sample = await Sample.create(
    {
      ...fields,
      customerId,
      isSimulated,
      labId,
      code: `S-${String(number).padStart(4, '0')}`,
      registeredById: actor.id,
    },
    ctx,
  );
  await StockEntry.create(
    {
      labId,
      sampleId: sample.id,
      kind: 'received',
      massG: input.receivedMassG,
      note: 'as received',
      studyId: null,
      runId: null,
      byId: actor.id,
    },
    ctx,
  );
  return sample;
}
