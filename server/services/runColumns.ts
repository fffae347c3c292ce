import type { SetPointKey } from '@shared/schemas/setPoint';
import { readNumber } from '@shared/text/readNumber';

/** What a column of a runs table means, and the unit in which its numbers are kept. */
export type ColumnMeaning =
  | { readonly kind: 'run' }
  | { readonly kind: 'note' }
  | { readonly kind: 'feedMassG' | 'beforeSievingG'; readonly unit: 'g' }
  | { readonly kind: 'set' | 'actual'; readonly setPoint: SetPointKey; readonly unit: string }
  | { readonly kind: 'misfires'; readonly unit: '' }
  | {
      readonly kind: 'conductivityStartUsPerCm' | 'conductivityEndUsPerCm';
      readonly unit: 'µS/cm';
    }
  | { readonly kind: 'waterTemperatureC'; readonly unit: '°C' }
  | { readonly kind: 'sieve'; readonly apertureMm: number; readonly unit: 'g' }
  | { readonly kind: 'measured'; readonly responseKey: string; readonly unit: string };

export interface RunColumn {
  readonly heading: string;
  readonly meaning: ColumnMeaning | null;
  /** The unit that the heading states, when it is another than the one kept. */
  readonly statedUnit: string | null;
  /** In words, for the preview; null when the column is not read. */
  readonly words: string | null;
}

const plain = (text: string) =>
  text
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[._-]+/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();

const UNITS: Record<SetPointKey, string> = {
  voltage: 'kV',
  gap: 'mm',
  pulses: '',
  frequency: 'Hz',
};

const FIXED: readonly (Found & { pattern: RegExp })[] = [
  { pattern: /^run( number| no)?$/, meaning: { kind: 'run' }, words: 'run number' },
  { pattern: /^(note|notes|remark|remarks)$/, meaning: { kind: 'note' }, words: 'note' },
  {
    pattern: /^(dry )?feed( mass)?$/,
    meaning: { kind: 'feedMassG', unit: 'g' },
    words: 'dry feed, g',
  },
  {
    pattern: /^(dry product )?before sieving$/,
    meaning: { kind: 'beforeSievingG', unit: 'g' },
    words: 'dry product before sieving, g',
  },
  {
    pattern: /^conductivity (at the )?start$/,
    meaning: { kind: 'conductivityStartUsPerCm', unit: 'µS/cm' },
    words: 'conductivity at the start, µS/cm',
  },
  {
    pattern: /^conductivity (at the )?end$/,
    meaning: { kind: 'conductivityEndUsPerCm', unit: 'µS/cm' },
    words: 'conductivity at the end, µS/cm',
  },
  {
    pattern: /^water temperature$/,
    meaning: { kind: 'waterTemperatureC', unit: '°C' },
    words: 'water temperature, °C',
  },
  { pattern: /^misfires$/, meaning: { kind: 'misfires', unit: '' }, words: 'misfires' },
  {
    pattern: /^pan( mass)?$/,
    meaning: { kind: 'sieve', apertureMm: 0, unit: 'g' },
    words: 'mass in the pan, g',
  },
];

function setPointColumn(name: string): Found | null {
  const [, before = '', point = '', after = ''] =
    /^(?:(set|delivered|actual|measured) )?(voltage|gap|pulses|frequency)(?: (set|delivered|actual|measured))?$/.exec(
      name,
    ) ?? [];
  if (point === '') return null;
  const setPoint = point as SetPointKey; // the pattern names exactly the four
  const how = before || after || 'set';
  const kind = how === 'set' ? 'set' : 'actual';
  const unit = UNITS[setPoint];
  const words = `${kind === 'set' ? 'set' : 'delivered'} ${setPoint}${unit && `, ${unit}`}`;
  return { meaning: { kind, setPoint, unit }, words };
}

/** "2 mm", "125 µm", "retained on 0,5 mm": a sieve, by its opening with a unit. */
function sieveColumn(heading: string): Found | null {
  const text = heading.normalize('NFKC').replace(/^\s*(retained|sieve|on|mass)(\s+on)?\s+/i, '');
  if (!/^\s*[\d.,]+\s*(mm|[µμu]m)\s*$/i.test(text)) return null;
  const reading = readNumber(text, 'mm');
  if (reading.kind !== 'number' || reading.value <= 0) return null;
  return {
    meaning: { kind: 'sieve', apertureMm: reading.value, unit: 'g' },
    words: `retained on ${reading.value} mm, g`,
  };
}

interface Response {
  readonly key: string;
  readonly name: string;
  readonly unit: string;
  readonly kind: string;
}

interface Found {
  readonly meaning: ColumnMeaning;
  readonly words: string;
}

function measuredColumn(name: string, responses: readonly Response[]): Found | null {
  const response = responses.find(
    (each) => each.kind === 'measured' && [plain(each.name), plain(each.key)].includes(name),
  );
  if (!response) return null;
  const { key: responseKey, name: shown, unit } = response;
  return {
    meaning: { kind: 'measured', responseKey, unit },
    words: `${shown}${unit && `, ${unit}`}`,
  };
}

/**
 * Reads a heading of a runs table. A unit may stand in brackets behind the name: `feed mass [kg]`.
 *
 * @param responses the study's responses: a measured one is read by its name or key.
 */
export function readHeading(heading: string, responses: readonly Response[]): RunColumn {
  const [, bare = heading, bracket = ''] = /^(.*?)\s*[[(]([^\])]*)[\])]\s*$/.exec(heading) ?? [];
  const name = plain(bare);
  const found: Found | null =
    FIXED.find(({ pattern }) => pattern.test(name)) ??
    setPointColumn(name) ??
    sieveColumn(bare) ??
    measuredColumn(name, responses);
  const statedUnit = bracket.trim() === '' ? null : bracket.trim();
  if (!found) return { heading, meaning: null, statedUnit, words: null };
  return { heading, meaning: found.meaning, statedUnit, words: found.words };
}
