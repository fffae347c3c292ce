/** Units that people type, as multiples of the unit a field keeps. */
const FAMILIES: Readonly<Record<string, Readonly<Record<string, number>> | undefined>> = {
  g: { mg: 0.001, g: 1, kg: 1000, t: 1_000_000 },
  mm: { um: 0.001, mm: 1, cm: 10, m: 1000 },
  kV: { V: 0.001, kV: 1 },
  Hz: { mHz: 0.001, Hz: 1, kHz: 1000 },
  'µS/cm': { 'uS/cm': 1, 'mS/cm': 1000 },
  '°C': { '°C': 1, C: 1 },
  '%': { '%': 1 },
  s: { s: 1, min: 60, h: 3600 },
  min: { min: 1, h: 60 },
  J: { J: 1, kJ: 1000 },
  'kWh/t': { 'kWh/t': 1 },
};

/** Both micro signs are one. */
const plain = (unit: string) => unit.replace(/[µμ]/g, 'u');

/**
 * How many of the kept unit one of the typed unit is, or null when the typed one is unknown here.
 * A unit without a family of its own takes only itself.
 */
export function unitFactor(kept: string, typed: string): number | null {
  const family = FAMILIES[kept];
  const wanted = plain(typed).toLowerCase();
  if (!family) return plain(kept).toLowerCase() === wanted ? 1 : null;
  // mg and Mg, mHz and MHz differ: the exact spelling first, any case only when it is not ambiguous
  const exact = family[plain(typed)];
  if (exact !== undefined) return exact;
  const loose = Object.keys(family).filter((unit) => unit.toLowerCase() === wanted);
  return loose.length === 1 ? (family[loose[0] ?? ''] ?? null) : null;
}

export function knownUnits(kept: string): string[] {
  const family = FAMILIES[kept];
  return family
    ? Object.keys(family).map((unit) => (unit.startsWith('u') ? `µ${unit.slice(1)}` : unit))
    : [kept];
}
