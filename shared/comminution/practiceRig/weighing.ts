import type { Random } from '../../stats/random/random';
import { CLASSES, MEAN_MM, type ClassMasses } from './sizeClasses';
import { sumOf } from './batch';

const BALANCE_SPREAD_G = 0.02;

const toHundredths = (massG: number) => Math.max(0, Math.round(massG * 100) / 100);

/**
 * What the bench would weigh: fine material lost on the way, a little carried over at each sieve, the
 * balance's scatter.
 *
 * @returns g by class, to 0.01 g; and the dry product before sieving, g.
 */
export function weighed(
  truth: ClassMasses,
  feedMassG: number,
  lossPercent: number,
  random: Random,
): { masses: ClassMasses; beforeSievingG: number } {
  const lossG = (feedMassG * Math.max(0, lossPercent + 0.25 * random.normal())) / 100;
  const fine = truth.map((mass, i) => mass * Math.exp(-MEAN_MM[i]! / 0.5));
  const fineG = sumOf(fine);
  const masses = truth.map((mass, i) => Math.max(0, mass - (lossG * fine[i]!) / fineG));
  const beforeSievingG = toHundredths(sumOf(masses) + BALANCE_SPREAD_G * random.normal());
  for (let i = 0; i < CLASSES - 1; i++) {
    const carry = 0.01 + 0.012 * random.normal();
    const moved = carry * (carry > 0 ? masses[i + 1]! : masses[i]!);
    masses[i]! += moved;
    masses[i + 1]! -= moved;
  }
  return {
    masses: masses.map((mass) => toHundredths(mass + BALANCE_SPREAD_G * random.normal())),
    beforeSievingG,
  };
}
