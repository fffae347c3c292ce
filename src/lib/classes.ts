/** Joins class names; what does not apply is false or undefined. */
export function classes(...names: readonly (string | false | undefined)[]): string {
  return names.filter(Boolean).join(' ');
}
