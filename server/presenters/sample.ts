import type { SampleJson, StockJson } from '@shared/schemas/sample';
import type { Sample } from '../models/Sample';
import type { StockEntry } from '../models/StockEntry';
import { byLine } from './byLine';

/** A sample with customer and registrar loaded, and its stock added up. */
export function presentSample(sample: Sample, stock: StockJson): SampleJson {
  return {
    id: sample.id,
    code: sample.code,
    name: sample.name,
    customer: sample.customer ? { id: sample.customer.id, name: sample.customer.name } : null,
    material: sample.material,
    description: sample.description,
    receivedMassG: sample.receivedMassG,
    receivedOn: sample.receivedOn,
    feedFromMm: sample.feedFromMm,
    feedToMm: sample.feedToMm,
    moisturePercent: sample.moisturePercent,
    storage: sample.storage,
    // the column holds what the schema let in
    cautions: sample.cautions as SampleJson['cautions'],
    stock,
    isSimulated: sample.isSimulated,
    by: byLine(sample.registeredBy),
    createdAt: sample.createdAt.toISOString(),
    version: sample.version,
  };
}

export function presentStockEntry(entry: StockEntry) {
  const { id, kind, massG, studyId, runId, note, createdAt } = entry;
  return {
    id,
    kind,
    massG,
    studyId,
    runId,
    note,
    by: byLine(entry.by),
    at: createdAt.toISOString(),
  };
}
