import { createHash } from 'node:crypto';

/** JSON with the keys of every object in order, so that equal contents are equal texts. */
function inOrder(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(inOrder);
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, each]) => each !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : 1))
      .map(([key, each]) => [key, inOrder(each)]),
  );
}

/** SHA-256 of a content, in hexadecimal; independent of the order in which its keys were written. */
export function contentHash(content: unknown): string {
  return createHash('sha256')
    .update(JSON.stringify(inOrder(content)))
    .digest('hex');
}
