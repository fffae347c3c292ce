import { Link } from 'react-router-dom';
import { classes } from '@/lib/classes';

export interface StageStop {
  readonly name: string;
  /** Half: reached once, but the study went back to an earlier stage. */
  readonly state: 'walked' | 'now' | 'half' | 'ahead';
  /** A short fact under the name: “21 runs, frozen 4 March”. */
  readonly fact?: string | undefined;
  readonly to?: string | undefined;
}

interface StageLineProps {
  readonly stages: readonly StageStop[];
  /** The home page's: larger, with its facts. */
  readonly isLarge?: boolean;
}

/** One line through the stages: solid and filled where walked, dashed and hollow where still to come. */
export function StageLine({ stages, isLarge = false }: StageLineProps) {
  const now = stages.findIndex(({ state }) => state === 'now');
  const current = stages[now];
  return (
    <div className="min-w-0">
      <ol aria-label="Stages of this study" className="grid auto-cols-fr grid-flow-col">
        {stages.map((stage, index) => (
          <Stop
            key={stage.name}
            stage={stage}
            isLast={index === stages.length - 1}
            isLarge={isLarge}
          />
        ))}
      </ol>
      {current && (
        <p aria-hidden="true" className="mt-1 text-2 font-mark text-accent sm:hidden">
          Stage {now + 1} of {stages.length}: {current.name}
        </p>
      )}
    </div>
  );
}

const WORDS: Record<StageStop['state'], string> = {
  walked: 'done',
  now: 'now',
  half: 'to be done again',
  ahead: 'to come',
};

const NAMES: Record<StageStop['state'], string> = {
  walked: 'text-ink-2',
  now: 'font-head text-accent',
  half: 'text-ink-2',
  ahead: 'text-ink-3',
};

interface StopProps {
  readonly stage: StageStop;
  readonly isLast: boolean;
  readonly isLarge: boolean;
}

function Stop({ stage, isLast, isLarge }: StopProps) {
  const { name, state, fact, to } = stage;
  return (
    <li aria-current={state === 'now' ? 'step' : undefined} className="min-w-0">
      <div className="relative flex h-4 items-center">
        {!isLast && (
          <div
            className={classes(
              'absolute inset-x-0',
              state === 'walked'
                ? 'border-t-2 border-ink'
                : 'border-t border-dashed border-line-strong',
            )}
          />
        )}
        <StopMark state={state} isLarge={isLarge} />
      </div>
      <div
        className={classes(
          'sr-only sm:not-sr-only sm:block sm:pr-2',
          isLarge ? 'text-4' : 'text-2',
        )}
      >
        <span className={NAMES[state]}>
          {to === undefined ? (
            name
          ) : (
            <Link to={to} className="hover:underline">
              {name}
            </Link>
          )}
          <span className="sr-only">, {WORDS[state]}</span>
        </span>
        {fact && (
          <span className={classes('block text-ink-3', isLarge ? 'text-2' : 'text-1')}>{fact}</span>
        )}
      </div>
    </li>
  );
}

const MARKS: Record<StageStop['state'], string> = {
  walked: 'bg-ink border-ink',
  now: 'turned bg-accent border-accent',
  half: 'bg-half-fill border-ink bg-paper',
  ahead: 'bg-paper border-line-strong',
};

function StopMark({ state, isLarge }: { state: StageStop['state']; isLarge: boolean }) {
  return (
    <span
      aria-hidden="true"
      className={classes('relative border-frame', isLarge ? 'size-3' : 'size-2.5', MARKS[state])}
    />
  );
}
