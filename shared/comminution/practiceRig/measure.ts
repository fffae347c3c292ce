import type { SieveMass } from '../sieve/sieveCurve';
import type { Noise } from './noise';
import { LOWER_MM, MIDDLE_MM, totalOf, type Masses } from './sizeClasses';

/** Share of the handling loss that happens before the product is weighed; the rest in the sieves. */
const BEFORE_SIEVING = 0.75;
/** Spread of the handling loss, per cent of the feed. */
const LOSS_SD_PERCENT = 0.25;
/** Fines go first: weight exp(−x/0.5 mm). */
const LOST_SIZE_MM = 0.5;
const BALANCE_SD_G = 0.02;
/** Near-mesh grains held back (or slipped through) per sieve: share of the next class. */
const NEAR_MESH = { mean: 0.01, sd: 0.012 };

export interface Sieving {
  readonly beforeSievingG: number;
  readonly sieves: readonly SieveMass[];
  readonly panG: number;
}

/** Class masses summed onto a stack of sieves, coarse to fine; the last entry is the pan. */
function ontoStack(masses: Masses, aperturesMm: readonly number[]): number[] {
  const out = new Array<number>(aperturesMm.length + 1).fill(0);
  masses.forEach((mass, i) => {
    const sieve = aperturesMm.findIndex((size) => LOWER_MM[i]! >= size - 1e-9);
    out[sieve < 0 ? aperturesMm.length : sieve]! += mass;
  });
  return out;
}

function lose(masses: Masses, lossG: number): Masses {
  const weights = masses.map((mass, i) => mass * Math.exp(-MIDDLE_MM[i]! / LOST_SIZE_MM));
  const sum = totalOf(weights);
  return masses.map((mass, i) => Math.max(0, mass - (lossG * weights[i]!) / sum));
}

function exchangeNearMesh(masses: number[], noise: Noise): void {
  for (let i = 0; i < masses.length - 1; i++) {
    const share = NEAR_MESH.mean + noise.gauss(NEAR_MESH.sd);
    const moved = share * (share > 0 ? masses[i + 1]! : masses[i]!);
    masses[i]! += moved;
    masses[i + 1]! -= moved;
  }
}

/**
 * What the bench would weigh: fines lost on the way, near-mesh grains on the wrong sieve, a balance that
 * shows hundredths. Without chance the true masses.
 *
 * @param masses product by size class, g. @param aperturesMm the lab’s stack, coarse to fine.
 */
export function measure(
  masses: Masses,
  aperturesMm: readonly number[],
  lossPercent: number,
  noise: Noise,
): Sieving {
  const named = (all: readonly number[], beforeSievingG: number): Sieving => ({
    beforeSievingG,
    sieves: aperturesMm.map((apertureMm, i) => ({ apertureMm, retainedG: all[i]! })),
    panG: all[aperturesMm.length]!,
  });
  if (!noise.random) return named(ontoStack(masses, aperturesMm), totalOf(masses));
  const reading = (grams: number) =>
    Math.max(0, Math.round((grams + noise.gauss(BALANCE_SD_G)) * 100) / 100);
  const percent = Math.max(0, lossPercent + noise.gauss(LOSS_SD_PERCENT));
  const lossG = (totalOf(masses) * percent) / 100;
  const before = lose(masses, BEFORE_SIEVING * lossG);
  const onStack = ontoStack(lose(before, (1 - BEFORE_SIEVING) * lossG), aperturesMm);
  exchangeNearMesh(onStack, noise);
  // a balance reads 0 on an empty sieve
  const read = onStack.map((grams) => (grams < BALANCE_SD_G ? 0 : reading(grams)));
  return named(read, reading(totalOf(before)));
}
