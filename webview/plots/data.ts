import type { Lane } from '../../core/protocol/messages';
import type { TakeView } from '../../core/protocol/views';

// What plots show: data without the DOM, so that what computes with it can be tested without one.

/** What a line stands for; told apart by stroke as well as colour (thin dotted, thin, thick, filled). */
export type Role = 'input' | 'desired' | 'output' | 'error' | 'figure' | 'figure2' | 'bound';

export interface Curve {
  label: string;
  role: Role;
  x: ArrayLike<number>;
  /** NaN: a gap. */
  y: ArrayLike<number>;
  /** Half widths of error bars. */
  errors?: ArrayLike<number> | null;
  /** Shaded interval around the curve. */
  low?: ArrayLike<number> | null;
  high?: ArrayLike<number> | null;
  style?: 'line' | 'stems' | 'points';
}

export type Mark =
  /** A place on the curve: the present choice (filled circle) or the suggested one (open diamond). */
  | { kind: 'place'; shape: 'now' | 'suggested'; x: number; y: number; label: string }
  /** A level across the plot. */
  | { kind: 'level'; y: number; label: string }
  /** A stretch of the x axis. */
  | { kind: 'span'; from: number; to: number; label: string };

export interface PlotData {
  curves: Curve[];
  marks: Mark[];
}

export interface Axis {
  label: string;
  unit: string;
  scale?: 'linear' | 'logarithmic';
}

export interface MapData {
  /** Along the horizontal and the vertical axis. */
  x: number[];
  y: number[];
  /** `values[iy * x.length + ix]`; NaN: none. */
  values: ArrayLike<number>;
  marks: { shape: 'now' | 'suggested'; x: number; y: number; label: string }[];
}

export type Kind = 'fit' | 'heldOut' | 'disturbanceOnly';

export interface LanesData {
  take: TakeView;
  takeNumber: number;
  /** Hz; null: the axis counts samples. */
  sampleRate: number | null;
  lanes: { lane: Lane; label: string; role: Role; min: number; max: number }[];
  /** Changes whenever the signals do, so that kept envelopes are dropped. */
  stamp: number;
}
