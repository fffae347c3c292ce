import { useRef, type ClipboardEvent, type KeyboardEvent } from 'react';
import { formatAperture, formatNumber } from '@/lib/format';
import { classes } from '@/lib/classes';
import type { RunProblems } from './runForm';

interface SieveGridProps {
  readonly aperturesMm: readonly number[];
  readonly values: Readonly<Record<string, string>>;
  readonly problems: RunProblems;
  /** Percent retained, by aperture as text, once all can be read. */
  readonly percents: Readonly<Record<string, number>>;
  readonly onChange: (values: Record<string, string>) => void;
}

/** Masses from coarse to pan. Enter goes to the next finer sieve; a pasted column fills downward. */
export function SieveGrid({ aperturesMm, values, problems, percents, onChange }: SieveGridProps) {
  const rows = useRef<(HTMLInputElement | null)[]>([]);
  const openings = [...aperturesMm, 0];
  const set = (changes: Record<string, string>) => onChange({ ...values, ...changes });
  const onKeyDown = (event: KeyboardEvent, i: number) => {
    const by =
      event.key === 'Enter'
        ? event.shiftKey
          ? -1
          : 1
        : event.key === 'ArrowDown'
          ? 1
          : event.key === 'ArrowUp'
            ? -1
            : 0;
    if (by === 0) return;
    event.preventDefault();
    rows.current[i + by]?.focus();
    rows.current[i + by]?.select();
  };
  const onPaste = (event: ClipboardEvent, i: number) => {
    const lines = event.clipboardData
      .getData('text')
      .trim()
      .split(/\r?\n|\t/);
    if (lines.length < 2) return;
    event.preventDefault();
    set(
      Object.fromEntries(
        lines.flatMap((line, k) => {
          const mm = openings[i + k];
          return mm === undefined ? [] : [[String(mm), line.trim()]];
        }),
      ),
    );
  };
  return (
    <div className="border border-line bg-surface" role="group" aria-label="Masses on the sieves">
      {openings.map((mm, i) => {
        const key = String(mm);
        const problem = problems[`sieves.${key}`];
        const name = mm === 0 ? 'pan' : formatAperture(mm);
        return (
          <div key={key} className={classes('sieve-row', problem !== undefined && 'bad')}>
            <label htmlFor={`sieve-${key}`} className="font-mark">
              {name}
              <span className="sr-only">{mm === 0 ? ', mass in g' : ' retained, mass in g'}</span>
            </label>
            <input
              id={`sieve-${key}`}
              ref={(element) => {
                rows.current[i] = element;
              }}
              inputMode="decimal"
              autoComplete="off"
              value={values[key] ?? ''}
              aria-invalid={problem !== undefined}
              aria-describedby={problem === undefined ? undefined : `sieve-${key}-problem`}
              onChange={(event) => set({ [key]: event.target.value })}
              onKeyDown={(event) => onKeyDown(event, i)}
              onPaste={(event) => onPaste(event, i)}
            />
            <span className="text-2 text-ink-3 text-right">
              {percents[key] === undefined ? 'g' : `${formatNumber(percents[key], 1)} %`}
            </span>
            {problem !== undefined && (
              <p id={`sieve-${key}-problem`} className="error">
                {problem}
              </p>
            )}
          </div>
        );
      })}
    </div>
  );
}
