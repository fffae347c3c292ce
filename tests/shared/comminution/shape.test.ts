import { describe, expect, it } from 'vitest';
import type { MaterialName } from '@shared/comminution/practiceRig/materials';
import { runPracticeRig } from '@shared/comminution/practiceRig/runPracticeRig';
import { APERTURES_MM } from '@shared/comminution/practiceRig/sizeClasses';
import { shapeIssues } from '@shared/comminution/sieve/shape';

/** Sound sievings are the practice rig’s; common practice, no source. */
const STACKS = {
  'every class': APERTURES_MM,
  'doubling sizes': [31.5, 16, 8, 4, 2, 1, 0.5, 0.25, 0.125, 0.063],
};
const SETTINGS: Record<MaterialName, [number, number, number]> = {
  granite: [165, 25, 45],
  concrete: [150, 24, 14],
  board: [170, 20, 140],
  slag: [155, 22, 80],
};
const SEEDS = Array.from({ length: 15 }, (_, i) => i + 1);

function sieved(material: MaterialName, seed: number, stack: readonly number[]) {
  const [voltageKv, gapMm, pulses] = SETTINGS[material];
  const { masses } = runPracticeRig({
    material,
    voltageKv,
    gapMm,
    pulses,
    frequencyHz: 2,
    seed,
  });
  const sieves = stack.map((apertureMm) => ({ apertureMm, retainedG: 0 }));
  let panG = 0;
  masses.forEach((mass, i) => {
    const sieve = sieves.find(({ apertureMm }) => (APERTURES_MM[i] ?? 0) >= apertureMm - 1e-9);
    if (sieve) sieve.retainedG += mass;
    else panG += mass;
  });
  return { sieves, panG };
}

const cases = Object.entries(STACKS).flatMap(([name, stack]) =>
  (Object.keys(SETTINGS) as MaterialName[]).map((material) => ({ name, stack, material })),
);

describe('the shape of a sieve curve', () => {
  it.each(cases)('$material on $name: a sound sieving earns next to no hint', (each) => {
    const hinted = SEEDS.filter((seed) => {
      const { sieves, panG } = sieved(each.material, seed, each.stack);
      return shapeIssues(sieves, panG).length > 0;
    });
    expect(hinted.length).toBeLessThanOrEqual(2);
  });

  // gravel and mortar make a valley at 2 mm: on a coarse stack a blinded sieve hides in it
  const shown = cases.filter(
    ({ name, material }) => name !== 'doubling sizes' || material !== 'concrete',
  );

  it.each(shown)('$material on $name: a blinded 2 mm sieve shows', (each) => {
    const found = SEEDS.filter((seed) => {
      const { sieves, panG } = sieved(each.material, seed, each.stack);
      const at = sieves.findIndex(({ apertureMm }) => apertureMm === 2);
      const held = 0.5 * sieves[at + 1]!.retainedG;
      sieves[at]!.retainedG += held;
      sieves[at + 1]!.retainedG -= held;
      return shapeIssues(sieves, panG).some(({ apertureMm }) => apertureMm === 2);
    });
    expect(found.length).toBeGreaterThanOrEqual(8);
  });

  it('names both of two rows that stand in each other’s place', () => {
    const { sieves, panG } = sieved('granite', 3, APERTURES_MM);
    const swapped = sieves.map((sieve) => ({ ...sieve }));
    const [a, b] = [2, 0.71].map((size) => swapped.find((s) => s.apertureMm === size)!);
    [a!.retainedG, b!.retainedG] = [b!.retainedG, a!.retainedG];
    expect(shapeIssues(swapped, panG).map(({ apertureMm }) => apertureMm)).toEqual([2, 0.71]);
  });

  it('has nothing to say about four sieves, or about nothing', () => {
    const four = [8, 4, 2, 1].map((apertureMm) => ({ apertureMm, retainedG: 9 }));
    expect(shapeIssues(four, 1)).toEqual([]);
    expect(
      shapeIssues(
        [...four, { apertureMm: 0.5, retainedG: 0 }].map((s) => ({ ...s, retainedG: 0 })),
        0,
      ),
    ).toEqual([]);
  });
});
