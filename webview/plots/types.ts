import type { Interval } from '../../core/pair/intervals';
import type { Envelope, EnvelopeRequest } from '../../core/protocol/messages';
import type { Axis, Kind, LanesData, MapData, PlotData } from './data';

export type { Axis, Curve, Kind, LanesData, MapData, Mark, PlotData, Role } from './data';

export interface PlotOptions {
  title: string;
  x: Axis;
  y: Axis;
  /** Called with the x of a clicked point or of one chosen by the keyboard. */
  onPick?: (x: number) => void;
}

/** A plot with its title, legend and table twin. Clean-up is `dispose`. */
export interface Plot {
  element: HTMLElement;
  /** Null: nothing to show yet. */
  show(data: PlotData | null): void;
  dispose(): void;
}

export interface ShadeMap {
  element: HTMLElement;
  show(data: MapData | null): void;
  dispose(): void;
}

export interface LanesOptions {
  title: string;
  envelope(request: EnvelopeRequest): Promise<Envelope>;
  /** Bands can be dragged where this is given; called once, when the drag ends. */
  onInterval?: (kind: Kind, number: number, interval: Interval) => void;
  /** Zoom and place in view, to be kept with the page's state. */
  onView?: (view: Interval) => void;
}

/** Waveforms on one time axis, with the intervals of the take as bands. */
export interface Lanes {
  element: HTMLElement;
  show(data: LanesData | null): void;
  /** Brings samples into view and marks them. */
  lead(span: Interval): void;
  view(): Interval | null;
  setView(view: Interval): void;
  dispose(): void;
}
