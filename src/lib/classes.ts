/** Joins the class names that apply. */
export const classes = (...names: (string | false | null | undefined)[]) =>
  names.filter(Boolean).join(' ');
