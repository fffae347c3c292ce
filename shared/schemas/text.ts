import { z } from 'zod';

/**
 * Characters that hide or reorder other characters: controls but tab and line ends, bidirectional
 * overrides, zero-width marks. They are taken out on entry; text in any script stays as it is.
 */
const HIDDEN =
  // eslint-disable-next-line no-control-regex -- the control characters are what this looks for
  /[\u0001-\u0008\u000B\u000C\u000E-\u001F\u007F-\u009F\u200B\u200E\u200F\u202A-\u202E\u2060-\u2064\u2066-\u2069\uFEFF]/g;
const LONE_SURROGATE = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

function words(maxLength: number) {
  return z
    .string()
    .refine((text) => !text.includes('\0') && !LONE_SURROGATE.test(text), {
      error: 'This text holds a character that cannot be stored. Type it again.',
    })
    .transform((text) => text.replace(HIDDEN, '').normalize('NFC').trim())
    .refine((text) => Array.from(text).length <= maxLength, {
      error: `Use at most ${maxLength} characters.`,
    });
}

/** A name or title on one line: required, trimmed, in composed form. */
export function lineSchema(label: string, maxLength = 120) {
  return words(maxLength).refine((text) => text.length > 0, { error: `${label} is needed.` });
}

/** Free text, possibly empty. */
export function textSchema(maxLength = 4000) {
  return words(maxLength);
}

/** Why something was changed, voided or withdrawn: at least five characters that say something. */
export const reasonSchema = words(1000).refine((text) => text.length >= 5, {
  error: 'Say why in a few words (at least 5 characters): others will read it.',
});

export const emailSchema = words(254)
  .transform((text) => text.toLowerCase())
  .refine((text) => /^[^\s@<>(),;:"[\]\\]+@[^\s@<>(),;:"[\]\\]+\.[^\s@.]+$/.test(text), {
    error: 'Enter one e-mail address, like name@lab.example.',
  });

const utf8Length = (text: string): number => {
  let bytes = 0;
  for (const character of text) {
    const code = character.codePointAt(0) ?? 0;
    bytes += code < 0x80 ? 1 : code < 0x800 ? 2 : code < 0x10000 ? 3 : 4;
  }
  return bytes;
};

/** bcrypt reads 72 bytes; a longer password would be cut silently, so it is refused. */
export const newPasswordSchema = z
  .string()
  .transform((text) => text.normalize('NFC'))
  .refine((text) => Array.from(text).length >= 12, { error: 'Use at least 12 characters.' })
  .refine((text) => utf8Length(text) <= 72, {
    error: 'Use at most 72 bytes (72 plain letters; fewer with accents or other scripts).',
  });
