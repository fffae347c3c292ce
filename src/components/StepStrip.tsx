import { classes } from '@/lib/classes';

interface StepStripProps {
  readonly name: string;
  readonly steps: readonly string[];
  /** Index of the step in hand. */
  readonly now: number;
}

/** The steps of one run: done filled, the one in hand in the accent, the rest to come. */
export function StepStrip({ name, steps, now }: StepStripProps) {
  return (
    <ol aria-label={name} className="grid auto-cols-fr grid-flow-col border-b border-line">
      {steps.map((step, index) => (
        <li
          key={step}
          aria-current={index === now ? 'step' : undefined}
          className={classes(
            'flex min-h-11 items-center justify-center gap-2.5 border-b-3 border-l border-l-line text-2 first:border-l-0 md:justify-start md:px-6 md:text-4',
            index === now ? 'border-b-accent font-head text-accent' : 'border-b-transparent',
            index < now && 'text-ink-2',
            index > now && 'text-ink-3',
          )}
        >
          {index <= now && (
            <span
              aria-hidden="true"
              className={classes(
                'hidden size-2.5 md:inline-block',
                index === now ? 'turned bg-accent' : 'bg-ink-2',
              )}
            />
          )}
          {step}
        </li>
      ))}
    </ol>
  );
}
