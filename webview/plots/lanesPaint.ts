import type { Interval } from '../../core/pair/intervals';
import type { Kind, LanesData } from './data';
import type { Intervals } from './intervalEnds';
import { drawAxes, drawLaneNames } from './laneAxes';
import { drawBars, drawGuides } from './laneBars';
import type { LaneSource } from './laneSource';
import type { LanesLayout } from './lanesLayout';
import { drawWave } from './laneWave';
import type { View } from './sampleView';
import { strokesOf } from './strokes';
import type { Palette } from './theme';

/** All that one drawing of the lanes shows. */
export interface LanesScene {
  layout: LanesLayout;
  data: LanesData;
  view: View;
  source: LaneSource;
  intervals: Intervals;
  names: Record<Kind, string>;
  unit: string;
  led: Interval | null;
  cursor: number | null;
  palette: Palette;
}

/** Draws the lanes from back to front. */
export function paintLanes(ctx: CanvasRenderingContext2D, scene: LanesScene): void {
  const { layout, data, view, source, palette } = scene;
  drawAxes(ctx, layout, data, view, scene.unit, palette);
  drawBars(ctx, layout, scene.intervals, scene.names, view, palette);
  const strokes = strokesOf(data.lanes);
  const envelopes = { fine: source.fine(), coarse: source.coarse() };
  data.lanes.forEach((lane, number) => {
    drawWave(ctx, layout, number, lane, strokes[number], view, envelopes, palette);
  });
  drawLaneNames(ctx, layout, data, palette);
  drawGuides(ctx, layout, scene.led, scene.cursor, view, palette);
}
