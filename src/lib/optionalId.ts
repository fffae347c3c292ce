/** The value of a list whose first line means none. */
export const optionalId = (value: string | number | null): number | null =>
  value === null || value === '' ? null : Number(value);
