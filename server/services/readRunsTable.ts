import Papa from 'papaparse';
import type { ImportAnswer, RunRecord } from '@shared/schemas/run';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import { readNumber, type DecimalSign } from '@shared/text/readNumber';
import { readHeading, type RunColumn } from './runColumns';

type Row = ImportAnswer['rows'][number];

/** One line of the table, read as far as it can be read. */
export interface ReadRow extends Row {
  readonly record: Omit<RunRecord, 'version' | 'why'> | null;
  /** Set-points that the line states, to be compared with the run's own. */
  readonly set: Partial<SettingJson>;
}

export interface ReadTable {
  readonly separator: string;
  readonly decimal: 'point' | 'comma';
  readonly columns: readonly RunColumn[];
  readonly rows: readonly ReadRow[];
  readonly problems: readonly string[];
}

const SEPARATORS = [';', ',', '\t', '|'];
const MAX_ROWS = 600;

/** A comma that can only be a decimal sign: not followed by exactly three digits, or behind a 0. */
const DECIMAL_COMMA = /^\s*[-+]?(\d+,(\d{1,2}|\d{4,})|0,\d+)\s*\D*$/;
const AMBIGUOUS_COMMA = /^\s*[-+]?[1-9]\d{0,2},\d{3}\s*\D*$/;
const DECIMAL_POINT = /^\s*[-+]?\d*\.\d+\s*\D*$/;

function decimalOf(
  cells: readonly string[],
  asked: DecimalSign,
): { decimal: 'point' | 'comma'; problem: string | null } {
  if (asked !== 'auto') return { decimal: asked, problem: null };
  const comma = cells.find((cell) => DECIMAL_COMMA.test(cell));
  const point = cells.find((cell) => DECIMAL_POINT.test(cell));
  if (comma !== undefined && point !== undefined)
    return {
      decimal: 'comma',
      problem: `This file writes both ‘${comma.trim()}’ and ‘${point.trim()}’. Say which sign is the decimal one.`,
    };
  const unclear = cells.find((cell) => AMBIGUOUS_COMMA.test(cell));
  if (comma === undefined && unclear !== undefined)
    return {
      decimal: 'point',
      problem: `‘${unclear.trim()}’ could be ${unclear.trim().replace(',', '.')} or ${unclear.trim().replace(',', '')}. Say which sign is the decimal one.`,
    };
  return { decimal: comma === undefined ? 'point' : 'comma', problem: null };
}

function parseCsv(csv: string): { cells: string[][]; separator: string } {
  const text = csv.replace(/^\uFEFF/, '').replace(/^sep=.\r?\n/i, '');
  const parsed = Papa.parse<string[]>(text, {
    delimitersToGuess: SEPARATORS,
    skipEmptyLines: 'greedy',
  });
  return { cells: parsed.data, separator: parsed.meta.delimiter };
}

/** Collects what a line says, and what is wrong with it. */
class LineReader {
  readonly problems: string[] = [];
  readonly warnings: string[] = [];

  constructor(private readonly decimal: DecimalSign) {}

  number(column: RunColumn, cell: string, unit: string): number | null {
    const { statedUnit } = column;
    const needsUnit = statedUnit !== null && statedUnit !== '' && /^[-+\d.,\s'’]+$/.test(cell);
    const reading = readNumber(needsUnit ? `${cell} ${statedUnit}` : cell, unit, this.decimal);
    if (reading.kind === 'problem') this.problems.push(`${column.heading}: ${reading.message}`);
    if (reading.kind !== 'number') return null;
    if (reading.note !== null && !needsUnit)
      this.warnings.push(`${column.heading}: ${reading.note}.`);
    return reading.value;
  }
}

type Draft = Omit<RunRecord, 'version' | 'why' | 'feedMassG'> & { feedMassG: number | null };

const emptyDraft = (): Draft => ({
  actual: { voltage: null, gap: null, pulses: null, frequency: null },
  misfires: null,
  conductivityStartUsPerCm: null,
  conductivityEndUsPerCm: null,
  waterTemperatureC: null,
  feedMassG: null,
  feedTyped: '',
  beforeSievingG: null,
  beforeSievingTyped: '',
  checks: [],
  sieves: [],
  measured: [],
  note: '',
});

interface Line {
  readonly draft: Draft;
  readonly set: Partial<Record<SetPointKey, number>>;
  runNumber: number | null;
}

function readSetPoint(
  line: Line,
  meaning: Extract<RunColumn['meaning'], { setPoint: SetPointKey }>,
  value: number | null,
): void {
  if (meaning.kind === 'actual') line.draft.actual[meaning.setPoint] = value;
  else if (value !== null) line.set[meaning.setPoint] = value;
}

function readCell(line: Line, column: RunColumn, cell: string, reader: LineReader): void {
  const { meaning } = column;
  const typed = cell.trim().slice(0, 40);
  const { draft } = line;
  if (meaning === null) return;
  if (meaning.kind === 'note') {
    draft.note = cell.trim();
    return;
  }
  const value = reader.number(column, cell, 'unit' in meaning ? meaning.unit : '');
  switch (meaning.kind) {
    case 'run':
      line.runNumber = value;
      return;
    case 'sieve':
      if (typed === '')
        reader.problems.push(`${column.heading}: empty. Enter 0 when nothing lay on it.`);
      if (value !== null)
        draft.sieves.push({ apertureMm: meaning.apertureMm, retainedG: value, typed });
      return;
    case 'measured':
      if (value !== null) draft.measured.push({ responseKey: meaning.responseKey, value, typed });
      return;
    case 'set':
    case 'actual':
      readSetPoint(line, meaning, value);
      return;
    default:
      draft[meaning.kind] = value;
      draft.feedTyped = meaning.kind === 'feedMassG' ? typed : draft.feedTyped;
      draft.beforeSievingTyped =
        meaning.kind === 'beforeSievingG' ? typed : draft.beforeSievingTyped;
  }
}

function readRow(
  columns: readonly RunColumn[],
  cells: readonly string[],
  at: { line: number; decimal: DecimalSign },
): ReadRow {
  const reader = new LineReader(at.decimal);
  const line: Line = { draft: emptyDraft(), set: {}, runNumber: null };
  columns.forEach((column, i) => {
    readCell(line, column, cells[i] ?? '', reader);
  });
  const { draft, set, runNumber } = line;
  if (cells.length > columns.length)
    reader.problems.push(
      `This line has ${cells.length} cells, the headings are ${columns.length}. Is a text with the separator not in quotes?`,
    );
  if (runNumber === null) reader.problems.push('The run number is missing.');
  const { feedMassG } = draft;
  if (feedMassG === null) reader.problems.push('The feed mass is missing.');
  return {
    line: at.line,
    runNumber,
    feedMassG,
    recoveredG:
      draft.sieves.length === 0
        ? null
        : draft.sieves.reduce((sum, { retainedG }) => sum + retainedG, 0),
    problems: reader.problems,
    warnings: reader.warnings,
    record: feedMassG === null || reader.problems.length > 0 ? null : { ...draft, feedMassG },
    set,
  };
}

function columnProblems(columns: readonly RunColumn[]): string[] {
  const problems: string[] = [];
  const known = columns.filter(({ meaning }) => meaning !== null);
  if (!known.some(({ meaning }) => meaning?.kind === 'run'))
    problems.push('There is no column ‘run’: the run number says where a line belongs.');
  if (!known.some(({ meaning }) => meaning?.kind === 'feedMassG'))
    problems.push('There is no column ‘feed mass’: percentages need the dry feed.');
  known.forEach(({ words, heading }, i) => {
    if (known.findIndex((other) => other.words === words) < i)
      problems.push(`‘${heading}’ is there twice: keep one column for ${words ?? heading}.`);
  });
  return problems;
}

/**
 * Reads a table of runs with sieve masses from CSV text: comma, semicolon, tab or bar between cells,
 * decimal comma or point, units in headings or cells. Reads all it can and lists every problem; nothing
 * is guessed silently.
 */
export function readRunsTable(
  csv: string,
  asked: DecimalSign,
  responses: Parameters<typeof readHeading>[1],
): ReadTable {
  const { cells, separator } = parseCsv(csv);
  const [headings = [], ...lines] = cells;
  const columns = headings.map((heading) => readHeading(heading.trim(), responses));
  const { decimal, problem } = decimalOf(lines.flat(), asked);
  const problems = columnProblems(columns);
  if (problem !== null) problems.push(problem);
  if (lines.length === 0) problems.push('There are headings but no lines below them.');
  if (lines.length > MAX_ROWS)
    problems.push(`${lines.length} lines are more than a study holds (${MAX_ROWS}).`);
  const rows = lines
    .slice(0, MAX_ROWS)
    .map((line, i) => readRow(columns, line, { line: i + 2, decimal }));
  return { separator, decimal, columns, rows, problems };
}
