import { StatsError } from '../errors';
import { combinations, type DesignPoint } from './designPoint';
import { bestGenerators, definingWords, lettersIn, resolutionOf, type Word } from './words';

/** What a two-level fraction confounds, in factor keys. */
export interface FractionProperties {
  readonly resolution: number | null;
  readonly generators: readonly string[];
  readonly definingRelation: readonly (readonly string[])[];
  readonly aliases: readonly (readonly string[])[];
}

export interface Fraction {
  readonly points: readonly DesignPoint[];
  readonly properties: FractionProperties;
}

const refuse = (message: string): never => {
  throw new StatsError('not-available', message);
};

/** One generator: factor `target` set equal to the product of `word`, with its sign. */
interface Generator {
  readonly target: number;
  readonly word: Word;
  readonly sign: 1 | -1;
}

/** Reads "frequency=voltage:gap:pulses" or "frequency=-voltage:gap". */
function readGenerator(keys: readonly string[], text: string): Generator {
  const [left = '', right = ''] = text.split('=').map((side) => side.trim());
  const target = keys.indexOf(left);
  const sign = right.startsWith('-') ? -1 : 1;
  const parts = right.replace(/^[-+]/, '').split(':');
  const places = parts.map((part) => keys.indexOf(part.trim()));
  if (target < 0 || places.some((place) => place < 0) || places.includes(target))
    refuse(
      `The generator ‘${text}’ cannot be read. Write it like ${keys.at(-1) ?? 'd'}=${keys.slice(0, -1).join(':')}.`,
    );
  return { target, word: places.reduce((word, place) => word | (1 << place), 0), sign };
}

function generatorsOf(
  keys: readonly string[],
  options: { generators?: readonly string[] | undefined; fraction?: number | undefined },
): Generator[] {
  const k = keys.length;
  if (options.generators) return options.generators.map((text) => readGenerator(keys, text));
  const p = options.fraction ?? 1;
  if (k - p < 2 || k < 3)
    refuse(`A fraction 2^(${k}−${p}) is too small: at least 3 factors and 4 runs are needed.`);
  return bestGenerators(k, p).map((word, i) => ({ target: k - p + i, word, sign: 1 }));
}

const keysIn = (keys: readonly string[], word: Word) =>
  keys.filter((_, i) => (word & (1 << i)) !== 0);

/** Main effects and two-factor interactions that a fraction cannot tell apart, as chains. */
function aliasChains(keys: readonly string[], words: readonly Word[]): string[][] {
  const k = keys.length;
  const effects: Word[] = keys.map((_, i) => 1 << i);
  for (let i = 0; i < k; i++) for (let j = i + 1; j < k; j++) effects.push((1 << i) | (1 << j));
  const seen = new Set<Word>();
  const chains: string[][] = [];
  for (const effect of effects) {
    if (seen.has(effect)) continue;
    const chain = [effect, ...words.map((word) => word ^ effect)].filter(
      (each) => effects.includes(each) && !seen.has(each),
    );
    chain.forEach((each) => seen.add(each));
    if (chain.length > 1)
      chains.push(
        [...chain]
          .sort((a, b) => lettersIn(a) - lettersIn(b) || a - b)
          .map((each) => keysIn(keys, each).join(':')),
      );
  }
  return chains;
}

function propertiesOf(
  keys: readonly string[],
  generators: readonly Generator[],
): FractionProperties {
  const words = definingWords(generators.map(({ target, word }) => word | (1 << target)));
  const resolution = resolutionOf(words);
  return {
    resolution: Number.isFinite(resolution) ? resolution : null,
    generators: generators.map(
      ({ target, word, sign }) =>
        `${keys[target]!}=${sign < 0 ? '-' : ''}${keysIn(keys, word).join(':')}`,
    ),
    definingRelation: words.map((word) => keysIn(keys, word)),
    aliases: aliasChains(keys, words),
  };
}

/**
 * A two-level fraction 2^(k−p) in standard order of its basic factors.
 *
 * @param keys of the factors. @param options generators, or p for the minimum-aberration ones.
 * @throws StatsError `not-available` for generators that cannot be read or contradict each other.
 * @see Box & Hunter (1961), Technometrics 3: 311–351; NIST/SEMATECH e-Handbook 5.3.3.4.
 */
export function fractional(
  keys: readonly string[],
  options: {
    generators?: readonly string[] | undefined;
    fraction?: number | undefined;
    foldOver?: boolean | undefined;
  },
): Fraction {
  const generators = generatorsOf(keys, options);
  const targets = new Set(generators.map(({ target }) => target));
  const basic = keys.flatMap((_, i) => (targets.has(i) ? [] : [i]));
  const uses = generators.some(({ word }) =>
    [...targets].some((target) => (word & (1 << target)) !== 0),
  );
  if (targets.size < generators.length || uses)
    refuse('Each generator sets one factor of its own, by factors that no generator sets.');
  const runs = combinations(basic.map(() => [-1, 1])).map((levels) => {
    const coded = new Array<number>(keys.length).fill(0);
    basic.forEach((place, i) => (coded[place] = levels[i]!));
    for (const { target, word, sign } of generators)
      coded[target] = basic.reduce<number>(
        (product, place) => ((word & (1 << place)) !== 0 ? product * coded[place]! : product),
        sign,
      );
    return coded;
  });
  const points = runs.map((coded): DesignPoint => ({ coded, type: 'factorial', block: 1 }));
  if (options.foldOver !== true) return { points, properties: propertiesOf(keys, generators) };
  const mirrored = runs.map((coded): DesignPoint => ({
    coded: coded.map((x) => -x),
    type: 'factorial',
    block: 2,
  }));
  return {
    points: [...points, ...mirrored],
    properties: foldedProperties(keys, generators),
  };
}

/** After a fold-over only the words of even length stay in the defining relation. */
function foldedProperties(
  keys: readonly string[],
  generators: readonly Generator[],
): FractionProperties {
  const words = definingWords(generators.map(({ target, word }) => word | (1 << target))).filter(
    (word) => lettersIn(word) % 2 === 0,
  );
  const resolution = resolutionOf(words);
  return {
    resolution: Number.isFinite(resolution) ? resolution : null,
    generators: propertiesOf(keys, generators).generators,
    definingRelation: words.map((word) => keysIn(keys, word)),
    aliases: aliasChains(keys, words),
  };
}
