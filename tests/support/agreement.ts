import { expect } from 'vitest';

const CAP = 15;

/** Digits of agreement, −log₁₀|q − c|/|c|, capped at 15; for a certified 0, −log₁₀|q|. */
export function digitsOf(value: number | null, certified: number): number {
  if (value === null) return 0;
  const error =
    certified === 0 ? Math.abs(value) : Math.abs(value - certified) / Math.abs(certified);
  return error === 0 ? CAP : Math.min(CAP, Math.max(0, -Math.log10(error)));
}

/** Relative closeness; where zero is due, against `scale`. */
export function expectClose(
  value: number | null | undefined,
  reference: number,
  options: { relative?: number; scale?: number; what?: string } = {},
): void {
  const { relative = 1e-9, scale = Math.abs(reference), what = '' } = options;
  expect(value, what).toBeTypeOf('number');
  const error = Math.abs((value ?? NaN) - reference);
  expect(error, `${what}: ${value ?? 'null'} instead of ${reference}`).toBeLessThanOrEqual(
    relative * scale,
  );
}
