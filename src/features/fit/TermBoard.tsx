import type { FitAnswer } from '@shared/schemas/calc/fit';
import type { Factor } from '@shared/stats/coding/factor';
import { descendantsOf, parentsOf } from '@shared/stats/model/heredity';
import { termsOf } from '@shared/stats/model/term';
import { useRef, type KeyboardEvent } from 'react';
import { termSymbol } from '@/lib/termSymbol';
import { formatP, formatSignificant } from '@/lib/format';
import { TermShape } from './TermShape';

interface TermBoardProps {
  readonly factors: readonly Factor[];
  readonly terms: readonly string[];
  readonly answer: FitAnswer | null;
  readonly onChange: (terms: string[]) => void;
}

const FULL_T = 8;

/** Taking a term out takes what hangs on it along; taking one in brings its parents. */
export function toggled(
  factors: readonly Factor[],
  terms: readonly string[],
  name: string,
): string[] {
  const pool = termsOf(factors, 'quadratic', false);
  const kept = new Set(terms);
  if (kept.has(name)) {
    kept.delete(name);
    for (const each of descendantsOf(pool, name)) kept.delete(each);
  } else {
    kept.add(name);
    for (const each of parentsOf(pool, name)) kept.add(each);
  }
  return pool.map((term) => term.name).filter((each) => kept.has(each));
}

/** Straight terms on top, squares on the diagonal, products below: each cell takes its term in or out. */
export function TermBoard({ factors, terms, answer, onChange }: TermBoardProps) {
  const board = useRef<HTMLDivElement>(null);
  const keys = factors.map(({ key }) => key);
  const k = keys.length;
  const cell = (row: number, column: number): string | null => {
    if (row === 0) return keys[column] ?? null;
    if (column > row - 1) return null;
    const [a = '', b = ''] = [keys[column], keys[row - 1]];
    return a === b ? `${a}^2` : `${a}:${b}`;
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const [dr, dc] = {
      ArrowUp: [-1, 0],
      ArrowDown: [1, 0],
      ArrowLeft: [0, -1],
      ArrowRight: [0, 1],
    }[event.key] ?? [0, 0];
    const here = (event.target as HTMLElement).dataset['at']?.split(' ').map(Number);
    if (!here || (dr === 0 && dc === 0)) return;
    const next = board.current?.querySelector<HTMLElement>(
      `[data-at="${(here[0] ?? 0) + (dr ?? 0)} ${(here[1] ?? 0) + (dc ?? 0)}"]`,
    );
    if (!next) return;
    event.preventDefault();
    next.focus();
  };
  return (
    <div
      ref={board}
      role="group"
      aria-label="Terms of the model"
      className="board"
      style={{ gridTemplateColumns: `repeat(${k}, minmax(6.5rem, 1fr))` }}
      onKeyDown={onKeyDown}
    >
      {Array.from({ length: k + 1 }, (_, row) =>
        Array.from({ length: k }, (_unused, column) => {
          const name = cell(row, column);
          if (name === null) return <span key={`${row} ${column}`} />;
          const term = answer?.terms.find((each) => each.term === name);
          const isIn = terms.includes(name);
          return (
            <button
              key={`${row} ${column}`}
              type="button"
              data-at={`${row} ${column}`}
              className="term"
              aria-pressed={isIn}
              onClick={() => onChange(toggled(factors, terms, name))}
            >
              <span className="flex items-center justify-between gap-2">
                <span className="font-mark">{termSymbol(name)}</span>
                <TermShape
                  kind={row === 0 ? 'straight' : row - 1 === column ? 'square' : 'product'}
                  estimate={isIn ? (term?.estimate ?? 0) : null}
                />
              </span>
              {isIn && term ? (
                <>
                  <span className="mono">
                    {term.estimate > 0 ? '+' : ''}
                    {formatSignificant(term.estimate)}
                  </span>
                  <span className="text-1 text-ink-3">p {formatP(term.p)}</span>
                  <span
                    className="bar-t"
                    style={{ width: `${Math.min(100, (100 * Math.abs(term.t ?? 0)) / FULL_T)}%` }}
                  />
                </>
              ) : (
                <span className="text-1">{isIn ? '' : 'left out'}</span>
              )}
            </button>
          );
        }),
      )}
    </div>
  );
}
