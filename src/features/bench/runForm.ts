import {
  runRecordSchema,
  type PRE_RUN_CHECKS,
  type RunJson,
  type RunRecord,
} from '@shared/schemas/run';
import type { BriefJson } from '@shared/schemas/study';
import { SET_POINT_KEYS, setPointOf, type SetPointKey } from '@shared/schemas/setPoint';
import { readNumber } from '@shared/text/readNumber';

export type CheckKey = (typeof PRE_RUN_CHECKS)[number]['key'];

/** What stands in the fields of a run, as typed. */
export interface RunForm {
  readonly checks: readonly CheckKey[];
  readonly actual: Readonly<Record<SetPointKey, string>>;
  readonly misfires: string;
  readonly conductivityStart: string;
  readonly conductivityEnd: string;
  readonly temperature: string;
  readonly feed: string;
  readonly beforeSieving: string;
  /** By aperture in mm as text; "0" is the pan. */
  readonly sieves: Readonly<Record<string, string>>;
  /** By response key. */
  readonly measured: Readonly<Record<string, string>>;
  readonly note: string;
  readonly why: string;
}

const text = (value: number | null) => (value === null ? '' : String(value));

/** The fields of a run as it was recorded, or empty ones; delivered pulses start at the set ones. */
export function formOfRun(run: RunJson, brief: BriefJson): RunForm {
  const isNew = run.status === 'planned';
  const openings = [...brief.sieveStack.aperturesMm, 0];
  const recorded = (mm: number) => run.sieves.find(({ apertureMm }) => apertureMm === mm);
  return {
    checks: run.checks,
    actual: {
      voltage: text(run.actual.voltage),
      gap: text(run.actual.gap),
      pulses: text(isNew ? run.settings.pulses : run.actual.pulses),
      frequency: text(run.actual.frequency),
    },
    misfires: text(run.misfires),
    conductivityStart: text(run.conductivityStartUsPerCm),
    conductivityEnd: text(run.conductivityEndUsPerCm),
    temperature: text(run.waterTemperatureC),
    feed: run.feedTyped || text(run.feedMassG),
    beforeSieving: run.beforeSievingTyped || text(run.beforeSievingG),
    sieves: Object.fromEntries(
      openings.map((mm) => [
        String(mm),
        recorded(mm)?.typed ?? text(recorded(mm)?.retainedG ?? null),
      ]),
    ),
    measured: Object.fromEntries(
      brief.responses
        .filter(({ kind }) => kind === 'measured')
        .map(({ key }) => [
          key,
          text(run.measured.find(({ responseKey }) => responseKey === key)?.value ?? null),
        ]),
    ),
    note: run.note,
    why: '',
  };
}

/** What is wrong, by field: `feed`, `sieves.2`, `actual.pulses`, `measured.free`, `why`, or `root`. */
export type RunProblems = Readonly<Record<string, string>>;

class Reader {
  readonly problems: Record<string, string> = {};

  number(field: string, typed: string, unit: string): number | null {
    const reading = readNumber(typed, unit);
    if (reading.kind === 'problem') this.problems[field] = reading.message;
    return reading.kind === 'number' ? reading.value : null;
  }
}

function sievesOf(form: RunForm, reader: Reader): RunRecord['sieves'] {
  const entries = Object.entries(form.sieves);
  const isSieved = entries.some(([, typed]) => typed.trim() !== '');
  if (!isSieved) return [];
  return entries.flatMap(([mm, typed]) => {
    const retainedG = reader.number(`sieves.${mm}`, typed, 'g');
    if (typed.trim() === '') reader.problems[`sieves.${mm}`] = 'Enter 0 when nothing lay on it.';
    return retainedG === null
      ? []
      : [{ apertureMm: Number(mm), retainedG, typed: typed.trim().slice(0, 40) }];
  });
}

const FIELD_OF: Readonly<Record<string, string>> = {
  feedMassG: 'feed',
  beforeSievingG: 'beforeSieving',
  conductivityStartUsPerCm: 'conductivityStart',
  conductivityEndUsPerCm: 'conductivityEnd',
  waterTemperatureC: 'temperature',
};

/** Where an issue of the schema or the server stands in this form. */
export function fieldOfPath(path: string, record: { sieves: RunRecord['sieves'] }): string {
  const sieve = /^sieves\.(\d+)/.exec(path);
  if (sieve) return `sieves.${record.sieves[Number(sieve[1])]?.apertureMm ?? ''}`;
  return FIELD_OF[path] ?? path;
}

/** Reads the fields into a record; every problem at its field. */
export function readRun(
  form: RunForm,
  version: number,
): { record: RunRecord | null; problems: RunProblems } {
  const reader = new Reader();
  const actual = Object.fromEntries(
    SET_POINT_KEYS.map((key) => [
      key,
      reader.number(`actual.${key}`, form.actual[key], setPointOf(key).unit),
    ]),
  );
  const feedMassG = reader.number('feed', form.feed, 'g');
  if (feedMassG === null && reader.problems['feed'] === undefined)
    reader.problems['feed'] = 'Enter the dry feed in g: every percentage stands on it.';
  const draft = {
    actual,
    misfires: reader.number('misfires', form.misfires, ''),
    conductivityStartUsPerCm: reader.number('conductivityStart', form.conductivityStart, 'µS/cm'),
    conductivityEndUsPerCm: reader.number('conductivityEnd', form.conductivityEnd, 'µS/cm'),
    waterTemperatureC: reader.number('temperature', form.temperature, '°C'),
    feedMassG,
    feedTyped: form.feed.trim().slice(0, 40),
    beforeSievingG: reader.number('beforeSieving', form.beforeSieving, 'g'),
    beforeSievingTyped: form.beforeSieving.trim().slice(0, 40),
    checks: [...form.checks],
    sieves: sievesOf(form, reader),
    measured: Object.entries(form.measured).flatMap(([responseKey, typed]) => {
      const value = reader.number(`measured.${responseKey}`, typed, '');
      return value === null ? [] : [{ responseKey, value, typed: typed.trim().slice(0, 40) }];
    }),
    note: form.note,
    why: form.why,
    version,
  };
  if (Object.keys(reader.problems).length > 0) return { record: null, problems: reader.problems };
  const parsed = runRecordSchema.safeParse(draft);
  if (parsed.success) return { record: parsed.data, problems: {} };
  return {
    record: null,
    problems: Object.fromEntries(
      parsed.error.issues.map(({ path, message }) => [fieldOfPath(path.join('.'), draft), message]),
    ),
  };
}
