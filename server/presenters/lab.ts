import type { RigJson, SieveStackJson } from '@shared/schemas/rig';
import type { RigEnvelope } from '../models/RigEnvelope';
import type { SieveStack } from '../models/SieveStack';

/** An envelope with its rig loaded. */
export function presentRig(row: RigEnvelope): RigJson {
  const { rig, revision, envelope } = row;
  if (!rig) throw new Error('presentRig needs the envelope’s rig.');
  return {
    id: rig.id,
    name: rig.name,
    isSimulated: rig.isSimulated,
    envelopeId: row.id,
    revision,
    envelope,
    since: row.createdAt.toISOString(),
  };
}

export function presentSieveStack(stack: SieveStack): SieveStackJson {
  const { id, name, frameDiameterMm, aperturesMm, version } = stack;
  return { id, name, frameDiameterMm, aperturesMm, version };
}
