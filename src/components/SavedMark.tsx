import { classes } from '@/lib/classes';

/** On the server; on this device alone; not even here. */
export type SavedState = 'sent' | 'here' | 'unsaved';

const DOTS: Record<SavedState, string> = {
  sent: 'bg-ink',
  here: 'bg-half-fill',
  unsaved: 'bg-transparent',
};

interface SavedMarkProps {
  readonly state: SavedState;
  /** “Saved on this tablet 10:42” */
  readonly claim: string;
  /** “1 entry waits for the network” */
  readonly note?: string;
}

/** Where the entries are. Always in sight at the bench, always with its words. */
export function SavedMark({ state, claim, note }: SavedMarkProps) {
  return (
    <div role="status" className="text-right text-2 whitespace-nowrap">
      <span
        aria-hidden="true"
        className={classes(
          'mr-1.5 inline-block size-2.5 rounded-round border-2 border-ink',
          DOTS[state],
        )}
      />
      {claim}
      {note && <span className="block text-ink-3">{note}</span>}
    </div>
  );
}
