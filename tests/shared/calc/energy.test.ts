import { describe, expect, it } from 'vitest';
import { energyAnswer } from '@shared/calc/energy';
import { pulseEnergyJ, specificEnergyKwhPerT } from '@shared/comminution/energy/pulseEnergy';
import { energyRequestSchema } from '@shared/schemas/calc/energy';
import reference from '../../reference/data/published/energy.json' with { type: 'json' };

const setting = {
  capacitanceNf: 32,
  voltageKv: 150,
  pulses: 40,
  frequencyHz: 5,
  gapMm: 30,
  massG: 300,
  chargingPowerW: 2800,
};

describe('pulse energy', () => {
  it('is ½CV² as published', () => {
    // The Engineering ToolBox, Capacitors – Stored Energy
    const { C_F, V, E_computed_J } = reference.pulse_energy[0]!;
    expect(pulseEnergyJ(C_F * 1e9, V / 1000)).toBeCloseTo(E_computed_J, 12);
  });

  it.each([
    [90, 129.6],
    [150, 360],
    [180, 518.4],
    [200, 640],
  ])('32 nF at %d kV store %d J', (voltageKv, energyJ) => {
    expect(energyAnswer({ ...setting, voltageKv }).pulseEnergyJ).toBe(energyJ);
  });

  it('converts to kWh/t: 1 kWh/t = 3.6 J/g', () => {
    for (const { pulses, E_J, mass_g, kWh_per_t } of reference.specific_energy
      .examples_computed_here)
      expect(specificEnergyKwhPerT(pulses * E_J, mass_g)).toBeCloseTo(kWh_per_t, 12);
  });
});

describe('energy answer', () => {
  it('gives all figures of a setting', () => {
    expect(energyAnswer(setting)).toEqual({
      pulseEnergyJ: 360,
      totalEnergyJ: 14_400,
      specificEnergyKwhPerT: expect.closeTo(13.3333333333, 9),
      durationS: 8,
      achievableDurationS: 8,
      averagePowerW: 1800,
      fieldKvPerMm: 5,
      warnings: [],
    });
  });

  // common practice, no source
  it.each([
    [10, 2],
    [50, 10],
    [60, 12],
  ])('%d pulses at 5 Hz take %d s', (pulses, durationS) => {
    expect(energyAnswer({ ...setting, pulses }).durationS).toBe(durationS);
  });

  it('says when the charger cannot keep up, and what it can', () => {
    const answer = energyAnswer({ ...setting, chargingPowerW: 1500 });
    expect(answer.durationS).toBe(8);
    expect(answer.achievableDurationS).toBeCloseTo((40 * 360) / 1500, 12);
    expect(answer.warnings[0]?.message).toMatch(/takes 1800 W.*at most 4.167 Hz/);
  });

  it('does without mass, gap and charger, and gives null for what hangs on them', () => {
    const { capacitanceNf, voltageKv, pulses, frequencyHz } = setting;
    expect(energyAnswer({ capacitanceNf, voltageKv, pulses, frequencyHz })).toMatchObject({
      specificEnergyKwhPerT: null,
      fieldKvPerMm: null,
      achievableDurationS: 8,
    });
  });

  it.each([{ voltageKv: -150 }, { pulses: 1.5 }, { frequencyHz: 0 }, { massG: 0 }, { water: 3 }])(
    'refuses %j',
    (more) => {
      expect(energyRequestSchema.safeParse({ ...setting, ...more }).success).toBe(false);
    },
  );
});
