/** Simulated data are marked wherever they show. */
export function PracticeTag({ isShort = false }: { readonly isShort?: boolean }) {
  return (
    <span className="tag practice">
      <span>{isShort ? 'Practice rig' : 'Practice rig: invented material'}</span>
    </span>
  );
}
