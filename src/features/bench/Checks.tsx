import { PRE_RUN_CHECKS } from '@shared/schemas/run';
import type { CheckKey } from './runForm';

interface ChecksProps {
  readonly done: readonly CheckKey[];
  readonly onChange: (done: CheckKey[]) => void;
}

/** What is checked before the first pulse; nothing is pre-ticked. */
export function Checks({ done, onChange }: ChecksProps) {
  const toggle = (key: CheckKey) => {
    onChange(done.includes(key) ? done.filter((each) => each !== key) : [...done, key]);
  };
  return (
    <section aria-label="Before the first pulse" className="grid gap-2 content-start">
      <h2 className="text-4 font-mark">Before the first pulse</h2>
      {PRE_RUN_CHECKS.map(({ key, label }) => {
        const isDone = done.includes(key);
        return (
          <button
            key={key}
            type="button"
            role="checkbox"
            aria-checked={isDone}
            className="tick"
            onClick={() => toggle(key)}
          >
            <i>
              {isDone && (
                <svg width="18" height="18" aria-hidden="true">
                  <path
                    d="M3 9.5L7.5 14L15.5 4"
                    fill="none"
                    stroke="var(--surface)"
                    strokeWidth="2.6"
                  />
                </svg>
              )}
            </i>
            <span>{label}</span>
          </button>
        );
      })}
    </section>
  );
}
