/** Fits a canvas to its box at the screen's resolution; hands back a context that draws in CSS pixels, or null where it has no size. */
export function fitCanvas(
  canvas: HTMLCanvasElement,
): { ctx: CanvasRenderingContext2D; width: number; height: number } | null {
  const box = canvas.parentElement;
  const width = box?.clientWidth ?? 0;
  const height = box?.clientHeight ?? 0;
  const ctx = canvas.getContext('2d');
  if (width === 0 || height === 0 || ctx === null) return null;
  const ratio = window.devicePixelRatio || 1;
  const wide = Math.round(width * ratio);
  const high = Math.round(height * ratio);
  if (canvas.width !== wide || canvas.height !== high) {
    canvas.width = wide;
    canvas.height = high;
    canvas.style.width = `${width}px`;
    canvas.style.height = `${height}px`;
  }
  ctx.setTransform(ratio, 0, 0, ratio, 0, 0);
  ctx.clearRect(0, 0, width, height);
  return { ctx, width, height };
}

/** Draws at most once a frame, however often it is asked to. */
export function oncePerFrame(draw: () => void): { ask(): void; cancel(): void } {
  let waiting = 0;
  return {
    ask() {
      if (waiting !== 0) return;
      waiting = requestAnimationFrame(() => {
        waiting = 0;
        draw();
      });
    },
    cancel() {
      cancelAnimationFrame(waiting);
      waiting = 0;
    },
  };
}
