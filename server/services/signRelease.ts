import { createHmac, timingSafeEqual } from 'node:crypto';
import { MEANING, type ReleaseContent } from '@shared/schemas/release';
import type { releaseInputSchema } from '@shared/schemas/release';
import { isComputed } from '@shared/schemas/response';
import { brokenLimits } from '@shared/study/envelope';
import { mayRelease } from '@shared/policies/study';
import type { z } from 'zod';
import { authorize } from '../authorize';
import type { Context } from '../context';
import { because } from '../context';
import { HttpError, impossible } from '../errors';
import { Fit } from '../models/Fit';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { Release } from '../models/Release';
import type { Study } from '../models/Study';
import { isPassword } from '../passwords';
import { services } from '../runtime';
import { contentHash } from './contentHash';
import { evidenceOf, type StudyEvidence } from './evidenceOf';
import { dataHash } from './keepFit';
import { recordEvent } from './recordEvent';
import { confirmationAt, expectationsAt } from './releaseEvidence';

type Input = z.output<typeof releaseInputSchema>;

/** The seal: a keyed hash that only this server can make. */
export function sealOf(studyId: number, revision: number, hash: string): string {
  return createHmac('sha256', services().config.sealKey)
    .update(`${studyId}:${revision}:${hash}`)
    .digest('hex');
}

export function isSealIntact(release: Release): boolean {
  const hash = contentHash(release.content);
  const seal = Buffer.from(sealOf(release.studyId, release.revision, hash));
  const stored = Buffer.from(release.seal);
  return (
    hash === release.contentHash && seal.length === stored.length && timingSafeEqual(seal, stored)
  );
}

/** An open session alone cannot sign. A wrong password is remembered, though nothing else is saved. */
async function checkPassword(password: string, ctx: Context): Promise<void> {
  const { actor, requestId } = ctx;
  const person = await Person.findByPk(actor.id, { transaction: ctx.transaction });
  if (await isPassword(password, person?.passwordHash ?? null)) return;
  await services().sequelize.transaction((transaction) =>
    recordEvent(
      { labId: actor.labId, person: actor, action: 'signature refused', requestId },
      transaction,
    ),
  );
  throw impossible('wrong-password', 'This is not your password. Nothing was signed.', 'password');
}

/** The kept model of each response that needs one; refuses while one is missing or out of date. */
async function keptModels(evidence: StudyEvidence, study: Study, ctx: Context): Promise<Fit[]> {
  const fits = await Fit.findAll({
    where: { studyId: study.id, isKept: true },
    include: 'madeBy',
    transaction: ctx.transaction,
  });
  for (const response of evidence.brief.responses) {
    if (response.aim === 'observe' || isComputed(response)) continue;
    const fit = fits.find(({ responseKey }) => responseKey === response.key);
    if (!fit)
      throw impossible(
        'no-model',
        `${response.name} has a goal but no kept model yet.`,
        'settings',
      );
    if (dataHash(evidence, response.key, fit) !== fit.dataHash)
      throw impossible(
        'stale-model',
        `Runs have changed since the model of ${response.name} was kept. Keep it anew first.`,
        'settings',
      );
  }
  return fits;
}

function checkSettings(evidence: StudyEvidence, { settings }: Input): void {
  const issues = brokenLimits(evidence.envelope, settings).map(({ key, message }) => ({
    path: `settings.${key}`,
    message,
  }));
  for (const { key, low, high } of evidence.brief.factors) {
    const value = settings[key];
    if (value < low || value > high)
      issues.push({
        path: `settings.${key}`,
        message: `The models were made for ${key} ${low} to ${high}; ${value} lies outside.`,
      });
  }
  if (issues.length > 0)
    throw new HttpError(422, 'outside-envelope', issues[0]?.message ?? '', { issues });
}

async function contentOf(
  study: Study,
  input: Input,
  evidence: StudyEvidence,
  ctx: Context,
): Promise<ReleaseContent> {
  const { sample, rigEnvelope } = study;
  if (!sample || !rigEnvelope?.rig) throw new Error('A study was signed without sample or rig.');
  const fits = await keptModels(evidence, study, ctx);
  const lab = await Lab.findByPk(study.labId, {
    transaction: ctx.transaction,
    rejectOnEmpty: true,
  });
  authorize(mayRelease, ctx.actor, {
    twoPersonRule: lab.twoPersonRule,
    keptBy: fits.map(({ madeById }) => madeById),
  });
  const choices = Object.fromEntries(
    fits.map(({ responseKey, terms, transform, settingsUsed, exclusions }) => [
      responseKey,
      { terms, transform, settingsUsed, exclusions },
    ]),
  );
  const confirmIds = evidence.runs
    .filter(({ purpose }) => purpose === 'confirm')
    .map(({ id }) => id);
  return {
    study: { code: study.code, title: study.title },
    sample: { code: sample.code, name: sample.name, material: sample.material },
    rig: { name: rigEnvelope.rig.name, revision: rigEnvelope.revision },
    settings: input.settings,
    batchMassG: evidence.brief.batchMassG,
    purpose: input.purpose,
    decisionRule: input.decisionRule,
    validUntil: input.validUntil,
    ...expectationsAt(evidence, choices, input.settings),
    confirmation: confirmationAt(evidence, choices, input.settings, confirmIds),
    models: fits.map((fit) => ({
      responseKey: fit.responseKey,
      fitId: fit.id,
      dataHash: fit.dataHash,
      keptBy: fit.madeBy?.name ?? '',
    })),
    twoPersonRule: lab.twoPersonRule,
    meaning: MEANING,
    signedBy: { id: ctx.actor.id, name: ctx.actor.name },
    signedAt: new Date().toISOString(),
    isSimulated: study.isSimulated,
  };
}

/**
 * Signs settings: the evidence is computed anew from the runs, hashed and sealed. A release is never
 * changed afterwards.
 */
export async function signRelease(study: Study, input: Input, ctx: Context): Promise<Release> {
  const evidence = await evidenceOf(study, ctx);
  checkSettings(evidence, input);
  const content = await contentOf(study, input, evidence, ctx);
  await checkPassword(input.password, ctx);
  const { id: studyId, labId } = study;
  const revision = 1 + (await Release.count({ where: { studyId }, transaction: ctx.transaction }));
  const hash = contentHash(content);
  const release = await Release.create(
    {
      labId,
      studyId,
      revision,
      content,
      contentHash: hash,
      seal: sealOf(studyId, revision, hash),
      signedById: ctx.actor.id,
    },
    because(ctx, input.purpose),
  );
  study.changed('updatedAt', true);
  await study.save(ctx);
  return release;
}
