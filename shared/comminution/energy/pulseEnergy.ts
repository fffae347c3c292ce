/**
 * Energy stored in the bank for one pulse, ½CV², in J.
 *
 * @param capacitanceNf erected capacitance, nF. @param voltageKv charging voltage, kV.
 */
export function pulseEnergyJ(capacitanceNf: number, voltageKv: number): number {
  // ½ · 1e-9 F/nF · (1e3 V/kV)²
  return 0.0005 * capacitanceNf * voltageKv ** 2;
}

/**
 * Energy per dry mass in kWh/t. 1 kWh/t = 3.6 J/g.
 *
 * @param energyJ J. @param massG dry mass, g, above 0.
 */
export function specificEnergyKwhPerT(energyJ: number, massG: number): number {
  return energyJ / massG / 3.6;
}

/** Highest pulse rate that the charger keeps up with, Hz: charging power ÷ energy of one pulse. */
export function chargingLimitHz(chargingPowerW: number, energyJ: number): number {
  return chargingPowerW / energyJ;
}
