import { useRef, type KeyboardEvent } from 'react';
import { TermCell, type Term } from './TermCell';

export type { Term } from './TermCell';

interface TermBoardProps {
  readonly label: string;
  /** Names of the set-points, in the order of rows and columns. */
  readonly factors: readonly string[];
  /** Straight terms have the same row and column −1; squares row = column; products row > column. */
  readonly terms: readonly Term[];
  readonly onToggled: (key: string) => void;
}

const STRAIGHT_ROW = -1;

const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
};

/** The terms of a quadratic model as a triangle of toggles: straight on top, squares on the diagonal. */
export function TermBoard({ label, factors, terms, onToggled }: TermBoardProps) {
  const board = useRef<HTMLDivElement>(null);
  const rows = [STRAIGHT_ROW, ...factors.keys()];
  const termAt = (row: number, column: number) =>
    terms.find((term) => term.row === row && term.column === column);
  const onKeyDown = (event: KeyboardEvent, { row, column }: Term) => {
    const step = ARROWS[event.key];
    if (!step) return;
    event.preventDefault();
    const next = termAt(row + step[0], column + step[1]);
    if (next) board.current?.querySelector<HTMLElement>(`[data-term="${next.key}"]`)?.focus();
  };
  return (
    <div ref={board} role="group" aria-label={label} className="overflow-x-auto">
      <div
        className="grid min-w-64 gap-1.5 text-2"
        style={{ gridTemplateColumns: `max-content repeat(${factors.length}, minmax(0, 1fr))` }}
      >
        {rows.map((row) => [
          <span key={`name ${row}`} className="self-center pr-2 text-ink-2">
            {row === STRAIGHT_ROW ? 'straight' : factors[row]}
          </span>,
          ...factors.map((_, column) => {
            const term = termAt(row, column);
            return term ? (
              <TermCell
                key={term.key}
                term={term}
                onToggled={() => onToggled(term.key)}
                onKeyDown={(event) => onKeyDown(event, term)}
              />
            ) : (
              <span key={`none ${row} ${column}`} />
            );
          }),
        ])}
        <span />
        {factors.map((factor) => (
          <span key={factor} className="text-center text-ink-2">
            {factor}
          </span>
        ))}
      </div>
    </div>
  );
}
