import { Menu, type MenuItem } from './Menu';

/** “Ines Hallworth” → IH; one word gives its first two letters. */
export function initialsOf(name: string): string {
  const words = name
    .trim()
    .split(/\s+/)
    .map((word) => Array.from(word));
  const first = words[0] ?? [];
  const last = words.length > 1 ? words.at(-1) : undefined;
  const letters = last ? [first[0], last[0]] : first.slice(0, 2);
  return letters.join('').toLocaleUpperCase('en-GB');
}

interface PersonMenuProps {
  readonly name: string;
  readonly role: string;
  readonly items: readonly MenuItem[];
}

/** Who is signed in. The mark is round, as only it and the run rings are. */
export function PersonMenu({ name, role, items }: PersonMenuProps) {
  return (
    <Menu
      heading={
        <>
          <span className="block text-ink">{name}</span>
          {role}
        </>
      }
      items={items}
      trigger={
        <button
          type="button"
          aria-label={`${initialsOf(name)}, signed in as ${name}`}
          className="grid size-9 flex-none place-items-center"
        >
          <span className="grid size-7 place-items-center rounded-round border border-line-strong text-label font-mark">
            {initialsOf(name)}
          </span>
        </button>
      }
    />
  );
}
