import { StatsError } from '../errors';
import type { EffectWord } from './effectWord';

/**
 * Generators of minimum aberration for 2^(k−p), by `k-p`: word j makes the factor that follows the k − p
 * basic ones (A, B, C …) as number j. Found by exhaustive search over all generators; the smaller ones
 * in the form in which they are usually printed.
 *
 * @see Fries & Hunter (1980), Minimum aberration 2^(k−p) designs, Technometrics 22: 601–608;
 *   NIST/SEMATECH e-Handbook 5.3.3.4.7.
 */
const MINIMUM_ABERRATION: Readonly<Record<string, string>> = {
  '3-1': 'AB',
  '4-1': 'ABC',
  '5-1': 'ABCD',
  '5-2': 'AB AC',
  '6-1': 'ABCDE',
  '6-2': 'ABC BCD',
  '6-3': 'AB AC BC',
  '7-1': 'ABCDEF',
  '7-2': 'ABCD ABDE',
  '7-3': 'ABC BCD ACD',
  '7-4': 'AB AC BC ABC',
  '8-1': 'ABCDEFG',
  '8-2': 'ABCD ABEF',
  '8-3': 'ABC ABD BCDE',
  '8-4': 'BCD ACD ABC ABD',
  '9-1': 'ABCDEFGH',
  '9-2': 'ACDFG BCEFG',
  '9-3': 'ABCDE ABCDF ABEF',
  '9-4': 'BCDE ACDE ABDE ABCE',
  '9-5': 'ABC BCD ACD ABD ABCD',
  '10-1': 'ABCDEFGHI',
  '10-2': 'ABCDEF ABCDGH',
  '10-3': 'ABCDEF ABCDG ABEFG',
  '10-4': 'ABCDE ABCDF ABEF ACEF',
  '10-5': 'ABCD ABCE ABDE ACDE BCDE',
  '10-6': 'ABCD ABC ABD ACD BCD AB',
  '11-1': 'ABCDEFGHIJ',
  '11-2': 'ABCDEFG ABCDHI',
  '11-3': 'ABCDEFG ABCDH ABEFH',
  '11-4': 'ABCDEFG ABCD ABEF ACEG',
  '11-5': 'ABCDE ABCDF ABCEF ADEF BDEF',
  '11-6': 'ABC BCD CDE ACD ADE BDE',
  '11-7': 'ABCD ABC ABD ACD BCD AB AC',
  '12-1': 'ABCDEFGHIJK',
  '12-2': 'ABCDEFG ABCDHIJ',
  '12-3': 'ABCDEFG ABCDHI ABEFHI',
  '12-4': 'ABCDEFG ABCDH ABEFH ACEGH',
  '12-5': 'ABCDEFG ABCD ABEF ACEG ADFG',
  '12-6': 'ABCDE ABCDF ABCEF ADEF BDEF CDEF',
  '12-7': 'ABCDE ABC ABD ACD BCD ABE ACE',
  '12-8': 'ABCD ABC ABD ACD BCD AB AC AD',
};

/** A factor of a fraction that is set by the product of others. */
export interface Generator {
  /** Place of the factor that is set. */
  readonly factor: number;
  /** The basic factors whose product sets it. */
  readonly mask: number;
  readonly sign: 1 | -1;
}

const maskOf = (word: string) =>
  Array.from(word).reduce((mask, letter) => mask | (1 << (letter.charCodeAt(0) - 65)), 0);

/**
 * The generators of minimum aberration of a 2^(k−p) fraction.
 *
 * @throws StatsError `not-available` when 2^(k−p) runs cannot hold k factors.
 */
export function bestGenerators(factors: number, fraction: number): Generator[] {
  const words = MINIMUM_ABERRATION[`${factors}-${fraction}`];
  if (words === undefined)
    throw new StatsError(
      'not-available',
      `A 2^(${factors}−${fraction}) fraction cannot tell ${factors} factors apart: 2^${factors - fraction} runs need ${factors - fraction} or more basic factors. Choose a smaller fraction.`,
    );
  return words
    .split(' ')
    .map((word, j) => ({ factor: factors - fraction + j, mask: maskOf(word), sign: 1 }));
}

function parseOne(text: string, keys: readonly string[]): Generator {
  const refuse = (why: string): never => {
    throw new StatsError('unknown-term', `The generator ‘${text}’ ${why}`);
  };
  const [left = '', right = '', ...more] = text.split('=').map((part) => part.trim());
  if (left === '' || right === '' || more.length > 0)
    return refuse('is read as factor = product, like frequency=voltage:gap:pulses.');
  const sign = right.startsWith('-') || right.startsWith('−') ? -1 : 1;
  const place = (key: string) => {
    const i = keys.indexOf(key.trim());
    return i < 0 ? refuse(`names ‘${key}’, which is no factor here.`) : i;
  };
  const places = right
    .replace(/^[-−+]/, '')
    .split(':')
    .map(place);
  const mask = places.reduce((all, i) => all | (1 << i), 0);
  if (new Set(places).size < places.length) return refuse('names a factor twice.');
  if (places.length < 2) return refuse('sets one factor equal to another: name two or more.');
  return { factor: place(left), mask, sign };
}

/**
 * Reads generators like `frequency=voltage:gap:pulses` (or `=-voltage:gap`).
 *
 * @throws StatsError `unknown-term` when one cannot be read; `aliased` when a generator uses a factor
 *   that is itself set, or two set the same factor.
 */
export function parseGenerators(texts: readonly string[], keys: readonly string[]): Generator[] {
  const generators = texts.map((text) => parseOne(text, keys));
  const set = generators.reduce((all, { factor }) => all | (1 << factor), 0);
  generators.forEach(({ factor, mask }, j) => {
    if (generators.findIndex((other) => other.factor === factor) < j)
      throw new StatsError('aliased', `Two generators set ${keys[factor]!}.`);
    if (mask & set)
      throw new StatsError(
        'aliased',
        `The generator ‘${texts[j]!}’ uses a factor that is itself set. Write it with basic factors only.`,
      );
  });
  return generators;
}

/** The word of the defining relation that a generator gives. */
export function wordOf({ factor, mask, sign }: Generator): EffectWord {
  return { mask: mask | (1 << factor), sign };
}
