import { Tabs as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

export interface Tab<Key extends string> {
  readonly key: Key;
  readonly label: ReactNode;
  readonly content: ReactNode;
}

interface TabsProps<Key extends string> {
  readonly label: string;
  readonly tabs: readonly Tab<Key>[];
  readonly open: Key;
  readonly onOpened: (key: Key) => void;
}

/** Several contents in one place, one in sight. The open one is ink with a rule below it. Arrows move. */
export function Tabs<Key extends string>({ label, tabs, open, onOpened }: TabsProps<Key>) {
  return (
    <Radix.Root
      value={open}
      onValueChange={(key) => {
        const tab = tabs.find((each) => each.key === key);
        if (tab) onOpened(tab.key);
      }}
    >
      <Radix.List
        aria-label={label}
        className="flex gap-5 overflow-x-auto border-b border-line px-4"
      >
        {tabs.map(({ key, label: text }) => (
          <Radix.Trigger
            key={key}
            value={key}
            className="-mb-px h-11 border-b-2 border-transparent whitespace-nowrap text-ink-3 hover:text-ink data-[state=active]:border-ink data-[state=active]:font-mark data-[state=active]:text-ink sm:h-9"
          >
            {text}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map(({ key, content }) => (
        <Radix.Content key={key} value={key}>
          {content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}
