/**
 * Why a calculation is impossible. `code` is stable and reaches scripts as it is; `message` is a plain
 * sentence that names cause and remedy; `details` holds names or numbers that a caller may show.
 */
export type StatsErrorCode =
  | 'aliased'
  | 'constant-response'
  | 'no-feasible-point'
  | 'not-available'
  | 'not-finite'
  | 'out-of-bounds'
  | 'outside-envelope'
  | 'rank-deficient'
  | 'shape'
  | 'too-few-runs'
  | 'too-many-factors'
  | 'unknown-term';

export class StatsError extends Error {
  override readonly name = 'StatsError';
  readonly code: StatsErrorCode;
  readonly details: Readonly<Record<string, unknown>>;

  constructor(code: StatsErrorCode, message: string, details: Record<string, unknown> = {}) {
    super(message);
    this.code = code;
    this.details = details;
  }
}
