import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { useSettled } from '@/hooks/useSettled';
import { Drawing } from '../Drawing';
import type { Point } from '../geometry';
import { contourMapOption, mapFrame } from './contourMapOption';
import { moveOf, type MapMove } from './mapKeys';
import type { MapInput, MapRun, Setting } from './mapInput';
import { nearestRun } from './nearestRun';

export interface MapHandlers {
  /** Arrows and Page keys. */
  readonly onMoved: (move: MapMove) => void;
  /** A tap or drag, in units of the axes, not yet on a settable step. */
  readonly onPlaced: (setting: Setting) => void;
  /** S swings the section. */
  readonly onSwung: () => void;
  /** T shows the table. */
  readonly onTableAsked: () => void;
}

interface ContourMapProps extends MapHandlers {
  readonly map: MapInput;
  readonly label: string;
  readonly height: number;
  /** The set-point with its numbers in a sentence: read out after 300 ms, shown above the finger. */
  readonly reading: string;
}

const KEYS =
  'Arrow keys move the set-point one step, Page Up and Page Down the one held; with Shift five steps. S swings the section, T shows the table.';
const SETTLED_MS = 300;
const ABOVE_FINGER = 44;

/** The map as something to steer: with keys, with a tap, or by dragging. */
export function ContourMap(props: ContourMapProps) {
  const { map, label, height, reading } = props;
  const [focused, setFocused] = useState<MapRun | null>(null);
  const announced = useSettled(reading, SETTLED_MS);
  const { ref, finger, ...pointer } = useMapPointer({ ...props, onHovered: setFocused });
  const onKeyDown = (event: KeyboardEvent) => {
    const move = moveOf(event.key, event.shiftKey);
    const isPlain = !event.ctrlKey && !event.metaKey && !event.altKey;
    if (move) props.onMoved(move);
    else if (isPlain && event.key.toLowerCase() === 's') props.onSwung();
    else if (isPlain && event.key.toLowerCase() === 't') props.onTableAsked();
    else return;
    event.preventDefault();
  };
  const input = { ...map, focusedRun: focused?.id ?? map.focusedRun ?? null };
  return (
    <>
      <div
        ref={ref}
        role="application"
        aria-label={`${label}. ${KEYS}`}
        tabIndex={0}
        onKeyDown={onKeyDown}
        {...pointer}
        className="relative cursor-crosshair touch-none select-none"
      >
        <Drawing height={height} option={(tokens, size) => contourMapOption(input, tokens, size)} />
        {finger && (
          <div
            aria-hidden="true"
            className="pointer-events-none absolute -translate-x-1/2 -translate-y-full rounded border border-line-strong bg-surface px-2 py-1 text-2 whitespace-nowrap"
            style={{ left: finger[0], top: finger[1] - ABOVE_FINGER }}
          >
            {reading}
          </div>
        )}
        {focused && !finger && <RunNumber run={focused} />}
      </div>
      <p aria-live="polite" className="sr-only">
        {announced}
      </p>
    </>
  );
}

function RunNumber({ run }: { run: MapRun }) {
  return (
    <div className="pointer-events-none absolute top-0 right-3 border border-line-strong bg-surface px-2 text-1">
      run {run.id}
    </div>
  );
}

interface PointerInput extends Pick<ContourMapProps, 'map' | 'height' | 'onPlaced'> {
  readonly onHovered: (run: MapRun | null) => void;
}

/** Where the pointer is, in the map's own units; dragging keeps it while the button or finger is down. */
function useMapPointer({ map, height, onPlaced, onHovered }: PointerInput) {
  const ref = useRef<HTMLDivElement>(null);
  const [finger, setFinger] = useState<Point | null>(null);
  const read = (event: PointerEvent) => {
    const box = event.currentTarget.getBoundingClientRect();
    const at: Point = [event.clientX - box.left, event.clientY - box.top];
    return { at, frame: mapFrame(map, { width: box.width, height }) };
  };
  const place = (event: PointerEvent) => {
    const { at, frame } = read(event);
    const [x, y] = frame.from(at);
    onPlaced({ x, y });
    setFinger(event.pointerType === 'mouse' ? null : at);
  };
  return {
    ref,
    finger,
    onPointerDown: (event: PointerEvent) => {
      if (event.button !== 0) return;
      event.currentTarget.setPointerCapture(event.pointerId);
      place(event);
    },
    onPointerMove: (event: PointerEvent) => {
      if (event.currentTarget.hasPointerCapture(event.pointerId)) {
        place(event);
        return;
      }
      const { at, frame } = read(event);
      onHovered(nearestRun(map.runs, frame, at));
    },
    onPointerUp: () => setFinger(null),
    onPointerLeave: () => {
      setFinger(null);
      onHovered(null);
    },
  };
}
