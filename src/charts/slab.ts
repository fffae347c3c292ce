import type { Point } from './geometry';

/** A setting on the settable floor: across, deep and high as shares of their ranges, 0…1. */
export interface Peg {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  /** Runs at this setting. */
  readonly count: number;
  /** It breaks a limit of the rig. */
  readonly isBroken: boolean;
}

/** All settings above one place of the floor, the lowest first. */
export interface Stack {
  readonly x: number;
  readonly y: number;
  readonly heads: readonly Peg[];
}

/** Pegs of one place share one stick; the far ones come first, so that the near ones stand before them. */
export function stacksOf(pegs: readonly Peg[]): Stack[] {
  const places = new Map<string, Peg[]>();
  for (const peg of pegs) {
    const place = `${peg.x} ${peg.y}`;
    places.set(place, [...(places.get(place) ?? []), peg]);
  }
  return [...places.values()]
    .map((heads) => ({
      x: heads[0]!.x,
      y: heads[0]!.y,
      heads: heads.sort((one, other) => one.z - other.z),
    }))
    .sort((one, other) => other.y - one.y || one.x - other.x);
}

export const SLAB_WIDTH = 300;
export const SLAB_HEIGHT = 164;

const INSET = 10;
const SKEW = 0.24;
const ALONG = (SLAB_WIDTH - 2 * INSET) / (1 + SKEW);
const DEEP = 70;
const BASE = SLAB_HEIGHT - 10;
/** The lowest head still stands clear of the floor. */
const FOOT = 9;
const RISE = 50;

/** From shares of the ranges to pixels on the tilted floor; with a height, above it. */
export function onSlab(x: number, y: number, z?: number): Point {
  const up = z === undefined ? 0 : FOOT + RISE * z;
  return [INSET + x * ALONG + y * ALONG * SKEW, BASE - y * DEEP - up];
}
