import { wheelFactor } from './sampleView';

/** What the pointer and the keys ask of the lanes; pixels are from the left edge of the time axis. */
export interface LaneActions {
  zoom(factor: number, pixel: number): void;
  panPixels(pixels: number): void;
  /** True where the key was one of ours. */
  key(key: string): boolean;
  moveCursor(pixels: number): void;
  placeCursor(pixel: number): void;
  escape(): void;
}

/**
 * Listens on the lanes. The wheel zooms only while the focus is in them, so that scrolling the page past them never
 * catches on them; a drag of less than three pixels is a click.
 */
export function listenToLanes(
  area: HTMLElement,
  canvas: HTMLElement,
  left: () => number,
  actions: LaneActions,
): void {
  const fromLeft = (event: MouseEvent) => event.clientX - canvas.getBoundingClientRect().left - left();
  area.addEventListener(
    'wheel',
    (event) => {
      if (!area.matches(':focus-within')) return;
      event.preventDefault();
      const sideways = event.shiftKey ? event.deltaX || event.deltaY : event.deltaX;
      if (event.shiftKey || Math.abs(event.deltaX) > Math.abs(event.deltaY)) actions.panPixels(sideways);
      else actions.zoom(wheelFactor(event.deltaY, event.deltaMode), fromLeft(event));
    },
    { passive: false },
  );
  let last: number | null = null;
  let moved = 0;
  canvas.addEventListener('pointerdown', (event) => {
    if (event.button !== 0) return;
    last = event.clientX;
    moved = 0;
    canvas.setPointerCapture(event.pointerId);
  });
  canvas.addEventListener('pointermove', (event) => {
    if (last === null) return;
    moved += Math.abs(event.clientX - last);
    if (moved >= 3) actions.panPixels(last - event.clientX);
    last = event.clientX;
  });
  canvas.addEventListener('pointerup', (event) => {
    if (last !== null && moved < 3) actions.placeCursor(fromLeft(event));
    last = null;
  });
  canvas.addEventListener('pointercancel', () => {
    last = null;
  });
  area.addEventListener('keydown', (event) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const step = event.key === 'ArrowLeft' ? -1 : event.key === 'ArrowRight' ? 1 : 0;
    if (event.key === 'Escape') actions.escape();
    else if (event.shiftKey && step !== 0) actions.moveCursor(step);
    else if (!actions.key(event.key)) return;
    event.preventDefault();
  });
}
