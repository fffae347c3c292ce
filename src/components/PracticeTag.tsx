/** Marks everything that comes from the practice rig. Never left out, never without its hatch. */
export function PracticeTag({ isShort = false }: { isShort?: boolean }) {
  return (
    <span className="inline-flex h-5 items-center border border-line-strong bg-surface bg-hatch-practice px-2 text-1 whitespace-nowrap">
      <span className="bg-surface px-1.5">
        {isShort ? 'Practice rig' : 'Practice rig: invented material'}
      </span>
    </span>
  );
}
