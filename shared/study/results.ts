import type { RunJson } from '../schemas/run';
import type { ResponseJson } from '../schemas/response';
import { erectedCapacitanceNf, type EnvelopeJson } from '../schemas/rig';
import type { ActualSettingJson, SettingJson } from '../schemas/setPoint';
import { sieveAnswer } from '../calc/sieve';
import { energyAnswer } from '../calc/energy';

/** The masses of one run, as the bench wrote them down. */
export type RunMasses = Pick<RunJson, 'feedMassG' | 'beforeSievingG' | 'sieves' | 'measured'>;

export interface RunResults {
  readonly results: Record<string, number | null>;
  readonly balances: RunJson['balances'];
  readonly shape: RunJson['shape'];
}

/** What was delivered where it was read, else what was set. */
export function deliveredSetting(set: SettingJson, actual: ActualSettingJson): SettingJson {
  return {
    voltage: actual.voltage ?? set.voltage,
    gap: actual.gap ?? set.gap,
    pulses: actual.pulses ?? set.pulses,
    frequency: actual.frequency ?? set.frequency,
  };
}

function sieveResults(masses: RunMasses, responses: readonly ResponseJson[]) {
  const { feedMassG, beforeSievingG, sieves } = masses;
  if (feedMassG === null || sieves.length === 0) return null;
  return sieveAnswer({
    feedMassG,
    ...(beforeSievingG === null ? {} : { beforeSievingG }),
    massBasis: 'dry',
    sieves: sieves
      .filter(({ apertureMm }) => apertureMm > 0)
      .map(({ apertureMm, retainedG }) => ({ apertureMm, retainedG })),
    panG: sieves.find(({ apertureMm }) => apertureMm === 0)?.retainedG ?? 0,
    passingAt: responses.flatMap(({ kind, apertureMm }) =>
      kind === 'passing' && apertureMm !== null ? [apertureMm] : [],
    ),
    percentiles: responses.flatMap(({ kind, percent }) =>
      kind === 'size' && percent !== null ? [percent] : [],
    ),
    interpolation: 'logSize',
  });
}

/** The computed responses of a setting with a batch of this mass: exact, no model needed. */
export function computedResults(
  envelope: EnvelopeJson,
  setting: SettingJson,
  massG: number,
): { specificEnergy: number | null; duration: number | null } {
  if (setting.pulses < 1) return { specificEnergy: 0, duration: 0 };
  const energy = energyAnswer({
    capacitanceNf: erectedCapacitanceNf(envelope),
    voltageKv: setting.voltage,
    pulses: setting.pulses,
    frequencyHz: setting.frequency,
    gapMm: setting.gap,
    massG,
    chargingPowerW: envelope.chargingPowerW,
  });
  return { specificEnergy: energy.specificEnergyKwhPerT, duration: energy.achievableDurationS };
}

/** Looks up one response among what was derived, computed or measured. */
function valueOf(
  response: ResponseJson,
  sieve: ReturnType<typeof sieveResults>,
  computed: ReturnType<typeof computedResults> | null,
  measured: RunMasses['measured'],
): number | null {
  switch (response.kind) {
    case 'passing':
      return sieve?.passing[String(response.apertureMm)] ?? null;
    case 'size':
      return sieve?.percentiles[String(response.percent)] ?? null;
    case 'specificEnergy':
    case 'duration':
      return computed?.[response.kind] ?? null;
    case 'measured':
      return measured.find(({ responseKey }) => responseKey === response.key)?.value ?? null;
  }
}

/**
 * All responses of one run, derived from its masses and settings: one value each, null where it cannot
 * be had (not sieved, outside the stack, not measured). Nothing here is ever stored.
 */
export function runResults(
  run: RunMasses & { settings: SettingJson; actual: ActualSettingJson },
  responses: readonly ResponseJson[],
  envelope: EnvelopeJson,
): RunResults {
  const sieve = sieveResults(run, responses);
  const setting = deliveredSetting(run.settings, run.actual);
  const computed =
    run.feedMassG === null ? null : computedResults(envelope, setting, run.feedMassG);
  const results = responses.map((response) => [
    response.key,
    valueOf(response, sieve, computed, run.measured),
  ]);
  return {
    results: Object.fromEntries(results) as Record<string, number | null>,
    balances: {
      treatment: sieve?.balance.treatment ?? null,
      sieving: sieve?.balance.sieving ?? null,
    },
    shape: [...(sieve?.shape ?? [])],
  };
}
