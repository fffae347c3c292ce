/** A key to press, beside what it does. */
export function KeyHint({ children }: { children: string }) {
  return (
    <kbd className="inline-grid h-5 min-w-5 place-items-center rounded border border-line-strong bg-surface px-1 font-mono text-1 text-ink-2">
      {children}
    </kbd>
  );
}
