import type { BriefInput } from '@shared/schemas/study';
import { SET_POINT_KEYS, type SetPointKey } from '@shared/schemas/setPoint';
import { brokenLimits, brokenRanges } from '@shared/study/envelope';
import { fullSetting } from '@shared/study/plan';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { Issue } from '@shared/schemas/error';
import type { Context } from '../context';
import { HttpError, notFound } from '../errors';
import { Sample } from '../models/Sample';
import { SieveStack } from '../models/SieveStack';
import type { Study } from '../models/Study';
import { newestEnvelope } from './newestEnvelope';

type Range = { low: number; high: number };

/** Low and high of every set-point; a held one is a range of one value. */
function rangesOf(brief: BriefInput): Record<SetPointKey, Range> {
  const range = (key: SetPointKey): Range => {
    const factor = brief.factors.find((each) => each.key === key);
    const held = brief.fixed[key] ?? NaN;
    return factor ? { low: factor.low, high: factor.high } : { low: held, high: held };
  };
  return {
    voltage: range('voltage'),
    gap: range('gap'),
    pulses: range('pulses'),
    frequency: range('frequency'),
  };
}

function pathOf(brief: BriefInput, key: SetPointKey | 'field' | 'power'): string {
  const at = key === 'field' || key === 'power' ? 'voltage' : key;
  const place = brief.factors.findIndex((factor) => factor.key === at);
  return place < 0 ? `brief.fixed.${at}` : `brief.factors.${place}.high`;
}

/** Ranges inside the envelope, held values on a step: each limit that is broken, at its field. */
function checkAgainstRig(brief: BriefInput, envelope: EnvelopeJson): void {
  const broken = brokenRanges(envelope, rangesOf(brief));
  const lowest = fullSetting(
    brief,
    Object.fromEntries(brief.factors.map(({ key, low }) => [key, low])),
  );
  const held = SET_POINT_KEYS.filter((key) => brief.fixed[key] !== null);
  broken.push(
    ...brokenLimits(envelope, lowest).filter(
      ({ key }) => held.some((each) => each === key) && !broken.some((other) => other.key === key),
    ),
  );
  if (broken.length === 0) return;
  const issues: Issue[] = broken.map(({ key, message }) => ({ path: pathOf(brief, key), message }));
  throw new HttpError(422, 'outside-envelope', issues[0]?.message ?? '', { issues });
}

/** Saves the whole Brief. The rig's newest envelope is taken, and from now on it is this study's. */
export async function saveBrief(study: Study, brief: BriefInput, ctx: Context): Promise<void> {
  const { actor, transaction } = ctx;
  const mine = { labId: actor.labId };
  const [sample, stack] = await Promise.all([
    Sample.findOne({ where: { id: brief.sampleId, ...mine }, transaction }),
    SieveStack.findOne({ where: { id: brief.sieveStackId, ...mine }, transaction }),
  ]);
  if (!sample) throw notFound('sample');
  if (!stack) throw notFound('sieve stack');
  const row = await newestEnvelope(brief.rigId, ctx);
  checkAgainstRig(brief, row.envelope);
  const { rigId: _rigId, ...columns } = brief;
  const isSimulated = brief.practiceMaterial !== null || row.rig?.isSimulated === true;
  await study.update({ ...columns, rigEnvelopeId: row.id, isSimulated }, ctx);
}
