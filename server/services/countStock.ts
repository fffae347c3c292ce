import type { StockJson } from '@shared/schemas/sample';
import { col, fn } from 'sequelize';
import type { Context } from '../context';
import { impossible } from '../errors';
import { Sample } from '../models/Sample';
import { StockEntry, type StockKind } from '../models/StockEntry';

type Sums = Record<StockKind, number>;

function balance(sums: Sums): StockJson {
  // a release gives a reservation back; use takes it up
  const reservedG = sums.reserved - sums.released;
  return {
    receivedG: sums.received,
    usedG: sums.used,
    lostG: sums.lost,
    returnedG: sums.returned,
    reservedG,
    leftG: Math.max(0, sums.received - sums.used - sums.lost - sums.returned - reservedG),
  };
}

/** The stock of each of these samples, added up from the ledger. Masses in g. */
export async function countStock(
  sampleIds: readonly number[],
  ctx: Pick<Context, 'transaction'>,
): Promise<Map<number, StockJson>> {
  const rows = (await StockEntry.findAll({
    attributes: ['sampleId', 'kind', [fn('SUM', col('mass_g')), 'massG']],
    where: { sampleId: [...sampleIds] },
    group: ['sampleId', 'kind'],
    raw: true,
    transaction: ctx.transaction,
  })) as { sampleId: number; kind: StockKind; massG: number }[];
  const empty = (): Sums => ({
    received: 0,
    reserved: 0,
    released: 0,
    used: 0,
    lost: 0,
    returned: 0,
  });
  const sums = new Map(sampleIds.map((id) => [id, empty()]));
  for (const { sampleId, kind, massG } of rows) {
    const sample = sums.get(sampleId);
    if (sample) sample[kind] = massG;
  }
  return new Map([...sums].map(([id, each]) => [id, balance(each)]));
}

export async function stockOf(
  sampleId: number,
  ctx: Pick<Context, 'transaction'>,
): Promise<StockJson> {
  const stock = (await countStock([sampleId], ctx)).get(sampleId);
  if (!stock) throw new Error(`The stock of sample ${sampleId} was not counted.`);
  return stock;
}

/**
 * Takes mass out of what is left, and never more: the sample’s row is locked, so two matrices cannot
 * both have the last portion.
 */
export async function takeStock(
  entry: {
    sampleId: number;
    kind: 'reserved' | 'lost' | 'returned';
    massG: number;
    studyId?: number;
    runId?: number;
    note?: string;
  },
  ctx: Context,
): Promise<void> {
  const { transaction, actor } = ctx;
  await Sample.findOne({
    where: { id: entry.sampleId, labId: actor.labId },
    transaction,
    lock: true,
  });
  const { leftG } = await stockOf(entry.sampleId, ctx);
  if (entry.massG > leftG + 1e-6)
    throw impossible(
      'not-enough-sample',
      `This takes ${round(entry.massG)} g, but ${round(leftG)} g of the sample is left. Take a smaller matrix or a smaller batch, or enter more stock.`,
      'massG',
    );
  await StockEntry.create(
    { studyId: null, runId: null, ...entry, labId: actor.labId, byId: actor.id },
    ctx,
  );
}

const round = (massG: number) => Math.round(massG * 10) / 10;
