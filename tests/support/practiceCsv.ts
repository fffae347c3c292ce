import { runPracticeRig } from '@shared/comminution/practiceRig/runPracticeRig';
import { APERTURES_MM } from '@shared/comminution/practiceRig/sizeClasses';

/** A run whose masses the practice rig makes up. */
export interface PracticeRun {
  readonly number: number;
  readonly voltage: number;
  readonly gap: number;
  readonly pulses: number;
}

const OPENINGS_MM = [16, 8, 4, 2, 1, 0.5, 0.25, 0.125, 0.063];

export const PRACTICE_HEADINGS =
  'run;set voltage [kV];set gap [mm];set pulses;feed mass [g];before sieving [g];delivered pulses;16 mm;8 mm;4 mm;2 mm;1 mm;0,5 mm;0,25 mm;0,125 mm;63 µm;pan';

const comma = (value: number) => value.toFixed(2).replace('.', ',');

/** Masses on the sieves from coarse to fine, then the pan, then before sieving; granite at 2 Hz. */
function massesOf(run: PracticeRun, seed: number) {
  const { masses, beforeSievingG } = runPracticeRig({
    material: 'granite',
    voltageKv: run.voltage,
    gapMm: run.gap,
    pulses: run.pulses,
    frequencyHz: 2,
    seed,
  });
  const onSieves = OPENINGS_MM.map(() => 0);
  let pan = 0;
  masses.forEach((mass, i) => {
    const at = OPENINGS_MM.findIndex((mm) => APERTURES_MM[i]! >= mm);
    if (at < 0) pan += mass;
    else onSieves[at] = onSieves[at]! + mass;
  });
  return { onSieves: [...onSieves, pan].map(comma), beforeSieving: comma(beforeSievingG) };
}

/** One line of CSV with semicolons and decimal commas. */
export function practiceLine(run: PracticeRun, seedBase: number): string {
  const { onSieves, beforeSieving } = massesOf(run, seedBase + run.number);
  const { number, voltage, gap, pulses } = run;
  return [number, voltage, gap, pulses, '300,00', beforeSieving, pulses, ...onSieves].join(';');
}
