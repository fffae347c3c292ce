/** A number shared out over places as evenly as can be; the first places get the rest. */
export function shareOut(count: number, places: number): number[] {
  return Array.from(
    { length: places },
    (_, i) => Math.floor(count / places) + (i < count % places ? 1 : 0),
  );
}
