/** A wish to move the set-point, in settable steps: x to the right, y up, z for the set-point held. */
export interface MapMove {
  readonly dx: number;
  readonly dy: number;
  readonly dz: number;
}

const STILL: MapMove = { dx: 0, dy: 0, dz: 0 };
const LARGE = 5;

const MOVES: Readonly<Record<string, Partial<MapMove>>> = {
  ArrowLeft: { dx: -1 },
  ArrowRight: { dx: 1 },
  ArrowUp: { dy: 1 },
  ArrowDown: { dy: -1 },
  PageUp: { dz: 1 },
  PageDown: { dz: -1 },
};

/** The move that a key asks for, five steps with Shift; null for another key. */
export function moveOf(key: string, isShifted: boolean): MapMove | null {
  const move = MOVES[key];
  if (!move) return null;
  const { dx, dy, dz } = { ...STILL, ...move };
  const factor = isShifted ? LARGE : 1;
  return { dx: dx * factor || 0, dy: dy * factor || 0, dz: dz * factor || 0 };
}
