import type { ReactNode } from 'react';
import { FillMark, type Fill } from './FillMark';

export interface CheckItem {
  readonly key: string;
  readonly fill: Fill;
  /** Says the fill in a word for readers: “done”, “partly”, “open”. */
  readonly state: string;
  readonly text: ReactNode;
}

/** What holds and what is still open, a sentence each. */
export function CheckList({ items }: { items: readonly CheckItem[] }) {
  return (
    <ul className="grid gap-2 text-2">
      {items.map(({ key, fill, state, text }) => (
        <li key={key} className="grid grid-cols-mark items-baseline">
          <FillMark fill={fill} label={state} />
          <div>{text}</div>
        </li>
      ))}
    </ul>
  );
}
