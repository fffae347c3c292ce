import type { SieveRow } from './curve';

export interface ShapeIssue {
  readonly apertureMm: number;
  readonly message: string;
}

/** Fewer sieves have no shape to speak of. */
const MIN_SIEVES = 5;
/** An excess on one sieve and a lack on its neighbour, both this large in ln(density), is no curve of a
 * product: sound sievings of the practice rig stay below 0.3 (0 for three of its four materials), a
 * sieve that pegs 45 % of the next class shows 0.65. */
const ZIGZAG = 0.3;
/** … and each at least this share of the whole, per cent: below it a balance reading makes a zigzag. */
const ZIGZAG_PERCENT = 1;
/** Two rows count as exchanged when putting them back takes away this much roughness (ln², summed) … */
const SWAP_GAIN = 0.3;
/** … and leaves less than this share of it. */
const SWAP_REST = 0.35;
const SWAP_REACH = 3;
/** Classes below this share do not bear on roughness; rows below twice it are not tried. */
const SMALL_PERCENT = 1;
/** An empty class has no logarithm: it counts as this share, per cent. */
const FLOOR_PERCENT = 0.001;

interface Misfit {
  /** ln(density found ÷ density expected between the neighbours); NaN at the ends. */
  readonly log: number;
  /** The same as a share of the whole, per cent. */
  readonly percent: number;
}

/** Each class against the straight line through its two neighbours, in ln(density) over ln(size). */
function misfits(apertures: readonly number[], percents: readonly number[]): Misfit[] {
  const width = (i: number) => Math.log(apertures[i - 1]! / apertures[i]!);
  const middle = (i: number) => Math.log(apertures[i - 1]! * apertures[i]!) / 2;
  const density = (i: number) => Math.log(Math.max(percents[i]!, FLOOR_PERCENT) / width(i));
  return apertures.map((_, i) => {
    // the class on the top sieve has no upper bound, hence no density
    if (i < 2 || i > apertures.length - 2) return { log: NaN, percent: NaN };
    const share = (middle(i) - middle(i - 1)) / (middle(i + 1) - middle(i - 1));
    const expected = density(i - 1) + share * (density(i + 1) - density(i - 1));
    return {
      log: density(i) - expected,
      percent: percents[i]! - Math.exp(expected) * width(i),
    };
  });
}

function roughness(apertures: readonly number[], percents: readonly number[]): number {
  return misfits(apertures, percents).reduce(
    (sum, { log }, i) =>
      Number.isNaN(log) || percents[i]! <= SMALL_PERCENT ? sum : sum + log * log,
    0,
  );
}

function zigzags(apertures: readonly number[], percents: readonly number[]): ShapeIssue[] {
  const fit = misfits(apertures, percents);
  return apertures.flatMap((apertureMm, i): ShapeIssue[] => {
    const [here, next] = [fit[i]!, fit[i + 1]];
    if (!next) return [];
    const sign = Math.sign(here.log);
    const isZigzag =
      Math.min(sign * here.log, -sign * next.log) > ZIGZAG &&
      Math.min(sign * here.percent, -sign * next.percent) > ZIGZAG_PERCENT;
    if (!isZigzag) return [];
    const below = apertures[i + 1]!;
    const message =
      sign > 0
        ? `Much is held at ${apertureMm} mm and little at ${below} mm for their neighbours. Is the ${apertureMm} mm sieve blinded, or are two rows exchanged? Brush, sieve again, weigh both.`
        : `Little is held at ${apertureMm} mm and much at ${below} mm for their neighbours. Is the ${below} mm sieve blinded or not tared, or are two rows exchanged? Weigh both again.`;
    return [{ apertureMm: sign > 0 ? apertureMm : below, message }];
  });
}

function exchange(apertures: readonly number[], percents: readonly number[]): ShapeIssue[] {
  const before = roughness(apertures, percents);
  let best = { gain: 0, rest: 1, i: -1, j: -1 };
  for (let i = 1; i < percents.length; i++) {
    for (let j = i + 1; j < Math.min(percents.length, i + SWAP_REACH + 1); j++) {
      if (Math.min(percents[i]!, percents[j]!) < 2 * SMALL_PERCENT) continue;
      const swapped = percents.with(i, percents[j]!).with(j, percents[i]!);
      const after = roughness(apertures, swapped);
      if (before - after > best.gain) best = { gain: before - after, rest: after / before, i, j };
    }
  }
  if (best.gain < SWAP_GAIN || best.rest > SWAP_REST || best.j === best.i + 1) return [];
  const [a, b] = [apertures[best.i]!, apertures[best.j]!];
  const message = `The curve runs smoothly if the masses at ${a} mm and ${b} mm change places. Were the two rows exchanged?`;
  return [
    { apertureMm: a, message },
    { apertureMm: b, message },
  ];
}

/**
 * What a mass balance cannot see: a blinded sieve (much on one sieve, little on the next) and two rows
 * written in each other’s place. Hints for a person, never a refusal; a product of two very different
 * parts may earn one now and then. Common practice, no source.
 *
 * @param sieves masses in g; fewer than five sieves have no shape.
 */
export function shapeIssues(sieves: readonly SieveRow[], panG: number): ShapeIssue[] {
  const rows = [...sieves].sort((a, b) => b.apertureMm - a.apertureMm);
  const totalG = rows.reduce((sum, { retainedG }) => sum + retainedG, panG);
  if (rows.length < MIN_SIEVES || totalG <= 0) return [];
  const apertures = rows.map(({ apertureMm }) => apertureMm);
  const percents = rows.map(({ retainedG }) => (100 * retainedG) / totalG);
  const exchanged = exchange(apertures, percents);
  // neighbours exchanged look like a blinded sieve: that hint names both
  const hints = exchanged.length > 0 ? exchanged : zigzags(apertures, percents);
  return hints.filter(
    ({ apertureMm }, i) => hints.findIndex((other) => other.apertureMm === apertureMm) === i,
  );
}
