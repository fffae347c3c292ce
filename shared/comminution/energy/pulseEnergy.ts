/**
 * Energy stored in the bank for one pulse, J: ½CV².
 *
 * @param capacitanceNf the **erected** capacitance in nF (stage value ÷ stages).
 * @param voltageKv in kV.
 */
export function pulseEnergyJ(capacitanceNf: number, voltageKv: number): number {
  // nF · kV² = mJ
  return 0.0005 * capacitanceNf * voltageKv ** 2;
}

/** Specific energy in kWh per tonne: 1 kWh/t = 3.6 J/g. */
export function specificEnergyKwhPerT(totalEnergyJ: number, massG: number): number {
  return totalEnergyJ / massG / 3.6;
}

/** The highest pulse frequency that the charging power keeps up with, Hz: P ÷ ½CV². */
export function highestFrequencyHz(chargingPowerW: number, energyJ: number): number {
  return chargingPowerW / energyJ;
}
