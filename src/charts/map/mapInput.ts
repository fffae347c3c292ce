import type { Grid } from '../grid';
import type { ChartTokens } from '../tokens';

export interface MapAxis {
  /** Ascending settings of the lattice, in the set-point's unit. */
  readonly values: readonly number[];
  readonly label: string;
  readonly unit: string;
}

export interface Setting {
  readonly x: number;
  readonly y: number;
}

export interface MapRun extends Setting {
  readonly id: string | number;
  /** Residual in run-to-run spreads. */
  readonly residualShare: number;
  /** Whether it was run near the slice shown; elsewhere it is only a ghost. */
  readonly onSlice: boolean;
}

export interface MapGoal {
  /** “80 %”, “fines 7 %” */
  readonly label: string;
  /** Of the response the goal is about, on the map's lattice. */
  readonly values: Grid;
  readonly level: number;
  readonly side: 'atLeast' | 'atMost';
}

export interface MapLimit {
  readonly label: string;
  readonly shortLabel?: string;
  /** Zero on the limit, positive where it can be set; in any unit, smooth. */
  readonly margin: Grid;
}

/** Everything the map draws, as plain numbers. */
export interface MapInput {
  readonly x: MapAxis;
  readonly y: MapAxis;
  /** The response: one row per y value, one column per x value. */
  readonly z: Grid;
  readonly unit: string;
  readonly limits: readonly MapLimit[];
  /** Spread of the mean over the run-to-run spread; null when it is not known. */
  readonly support: Grid | null;
  readonly runs: readonly MapRun[];
  readonly goals: readonly MapGoal[];
  readonly setPoint: Setting | null;
  readonly section: { readonly from: Setting; readonly to: Setting } | null;
  /** The run that has the focus or the pointer. */
  readonly focusedRun?: string | number | null;
}

/** From here on few data: veiled once, and again above the second. */
export const FEW_DATA = 0.6;
export const FEWER_DATA = 0.75;

/** Room around the ranges, so that rings on the edge are whole. */
export const RIM_SHARE = 0.03;

/** What the layers of one drawing share. */
export interface Scene {
  readonly input: MapInput;
  readonly tokens: ChartTokens;
  readonly isNarrow: boolean;
}
