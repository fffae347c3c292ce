import { runRecordSchema, type ImportAnswer, type RunRecord } from '@shared/schemas/run';
import type { importInputSchema } from '@shared/schemas/run';
import { SET_POINT_KEYS, type SettingJson } from '@shared/schemas/setPoint';
import type { z } from 'zod';
import type { Context } from '../context';
import { HttpError } from '../errors';
import { Person } from '../models/Person';
import { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { readRunsTable, type ReadRow } from './readRunsTable';
import { checkMasses, recordRun } from './recordRun';

interface Match {
  readonly row: ReadRow;
  readonly run: Run | null;
  readonly problems: string[];
  readonly record: RunRecord | null;
}

const settingOf = (run: Run): SettingJson => ({
  voltage: run.setVoltageKv,
  gap: run.setGapMm,
  pulses: run.setPulses,
  frequency: run.setFrequencyHz,
});

/** A stated set-point that differs from the frozen one means that line and run do not belong together. */
function otherSettings(row: ReadRow, run: Run): string[] {
  const set = settingOf(run);
  return SET_POINT_KEYS.flatMap((key) => {
    const stated = row.set[key];
    if (stated === undefined || Math.abs(stated - set[key]) <= 1e-9 * set[key]) return [];
    return [
      `The file says ${key} ${stated}, run ${run.number} is set to ${set[key]}. Is it the right run? What was delivered goes into ‘delivered ${key}’.`,
    ];
  });
}

function messageOf(error: unknown): string {
  if (error instanceof HttpError) return error.message;
  throw error;
}

function missingSieves(row: ReadRow, study: Study): string[] {
  const sieves = row.record?.sieves ?? [];
  if (sieves.length === 0) return [];
  const stack = study.sieveStack?.aperturesMm ?? [];
  const missing = stack.filter((mm) => !sieves.some(({ apertureMm }) => apertureMm === mm));
  const others = sieves.filter(({ apertureMm }) => apertureMm !== 0 && !stack.includes(apertureMm));
  return [
    ...(missing.length > 0
      ? [`No column for ${missing.map((mm) => `${mm} mm`).join(', ')} of the study’s stack.`]
      : []),
    ...others.map(({ apertureMm }) => `${apertureMm} mm is not in the study’s stack.`),
  ];
}

/** What speaks against recording this line for this run, beside what the line itself says. */
function matchProblems(row: ReadRow, run: Run | null, rows: readonly ReadRow[]): string[] {
  const { runNumber } = row;
  if (runNumber === null) return [];
  if (run === null) return [`This study has no run ${runNumber}.`];
  const problems = otherSettings(row, run);
  if (run.status === 'recorded')
    problems.push(`Run ${runNumber} is recorded already: correct it on its own page.`);
  if (run.status === 'void') problems.push(`Run ${runNumber} is void.`);
  if (rows.some((other) => other.line < row.line && other.runNumber === runNumber))
    problems.push(`Run ${runNumber} is in the file twice.`);
  return problems;
}

/** The line as a record of its run, checked like one that was typed. */
function recordOf(row: ReadRow, run: Run): { record: RunRecord | null; problems: string[] } {
  if (row.record === null) return { record: null, problems: [] };
  const parsed = runRecordSchema.safeParse({ ...row.record, version: run.version });
  if (!parsed.success)
    return { record: null, problems: parsed.error.issues.map(({ message }) => message) };
  try {
    checkMasses(parsed.data);
    return { record: parsed.data, problems: [] };
  } catch (error) {
    return { record: null, problems: [messageOf(error)] };
  }
}

function match(row: ReadRow, runs: readonly Run[], rows: readonly ReadRow[]): Match {
  const run = runs.find(({ number }) => number === row.runNumber) ?? null;
  const read = run === null ? { record: null, problems: [] } : recordOf(row, run);
  const problems = [...row.problems, ...matchProblems(row, run, rows), ...read.problems];
  return { row, run, problems, record: read.record };
}

/**
 * Reads a CSV of runs and, once accepted and free of problems, records them all in one transaction in
 * run order. With a problem in any line nothing is recorded: half an import is worse than none.
 */
export async function importRuns(
  study: Study,
  { csv, accept, decimal, fileName }: z.output<typeof importInputSchema>,
  ctx: Context,
): Promise<ImportAnswer> {
  const table = readRunsTable(csv, decimal, study.responses ?? []);
  const runs = await Run.findAll({
    where: { studyId: study.id },
    include: { model: Person, as: 'operator' },
    transaction: ctx.transaction,
  });
  const matches = table.rows.map((row) => match(row, runs, table.rows));
  const isClean =
    table.problems.length === 0 && matches.every(({ problems }) => problems.length === 0);
  const warnings = new Map<number, string[]>();
  if (accept && isClean) {
    const inOrder = [...matches].sort((a, b) => (a.run?.number ?? 0) - (b.run?.number ?? 0));
    const why = `imported${fileName === '' ? '' : ` from ${fileName}`}`;
    for (const { row, run, record } of inOrder) {
      if (!run || !record) continue;
      const { warnings: heard } = await recordRun(run, study, { ...record, why }, ctx);
      warnings.set(row.line, heard);
    }
  }
  return {
    accepted: accept && isClean,
    separator: table.separator,
    decimal: table.decimal,
    columns: table.columns.map(({ heading, words }) => ({ heading, meaning: words })),
    rows: matches.map(({ row, problems }) => ({
      line: row.line,
      runNumber: row.runNumber,
      feedMassG: row.feedMassG,
      recoveredG: row.recoveredG,
      problems,
      warnings: [...row.warnings, ...missingSieves(row, study), ...(warnings.get(row.line) ?? [])],
    })),
    problems: [...table.problems],
  };
}
