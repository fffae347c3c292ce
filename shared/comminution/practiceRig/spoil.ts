import type { Sieving } from './measure';

/** Mistakes of a bench, for outliers in demonstrations: some show in the balance, some only in shape. */
export type Mistake = 'panLost' | 'blinded' | 'tare' | 'exchanged' | 'damp';

/** Mass of a bowl that was not tared, g. */
const BOWL_G = 41.3;
const cents = (grams: number) => Math.round(grams * 100) / 100;

/**
 * Spoils a sieving at one sieve the way a bench does. The total is kept by `blinded` and `exchanged`.
 *
 * @param apertureMm the sieve concerned; the next finer ones take part.
 */
export function spoil(sieving: Sieving, mistake: Mistake, apertureMm: number): Sieving {
  const at = sieving.sieves.findIndex((sieve) => sieve.apertureMm === apertureMm);
  const masses = sieving.sieves.map(({ retainedG }) => retainedG);
  const [here = 0, next = 0, second = 0, third = 0] = masses.slice(Math.max(at, 0), at + 4);
  const set = (offset: number, grams: number) => {
    if (at >= 0 && at + offset < masses.length) masses[at + offset] = cents(grams);
  };
  let { panG } = sieving;
  if (mistake === 'panLost') panG = 0;
  if (mistake === 'blinded') {
    // pegged mesh holds back the next two classes
    set(0, here + 0.45 * next + 0.2 * second);
    set(1, 0.55 * next);
    set(2, 0.8 * second);
  }
  if (mistake === 'tare') set(2, second + BOWL_G);
  if (mistake === 'exchanged') {
    set(0, third);
    set(3, here);
  }
  if (mistake === 'damp') {
    sieving.sieves.forEach((sieve, i) => {
      masses[i] = cents(masses[i]! * (1 + 0.12 * Math.exp(-sieve.apertureMm / 0.3)));
    });
    panG = cents(panG * 1.12);
  }
  const sieves = sieving.sieves.map((sieve, i) => ({ ...sieve, retainedG: masses[i]! }));
  return { ...sieving, sieves, panG };
}
