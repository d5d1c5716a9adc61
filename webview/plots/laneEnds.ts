import { make } from './elements';
import type { End } from './intervalEnds';
import { barRow, gripBox } from './lanesLayout';
import { barStrokes } from './strokes';
import { cssColour } from './theme';

/** An end as it is shown: its place from the left edge of the time axis, its value and what is said of it. */
export interface ShownEnd {
  end: End;
  pixel: number;
  /** Middle of its row. */
  middle: number;
  sample: number;
  limits: { min: number; max: number };
  label: string;
  valueText: string;
}

/** What is done with an end; `pixel` is from the left edge of the time axis. */
export interface EndActions {
  drag(end: End, pixel: number): void;
  /** True where the key was one of ours. */
  key(end: End, key: string, fast: boolean): boolean;
  finish(): void;
  cancel(): void;
  /** An end out of view got the focus. */
  reach(end: End): void;
}

const keyOf = ({ kind, number, end }: End) => `${kind} ${number} ${end}`;

/** Handles of the ends of intervals: sliders for the keyboard, taken hold of with the pointer. */
export function newLaneEnds(
  area: HTMLElement,
  actions: EndActions,
): { place(ends: ShownEnd[], left: number, across: number): void } {
  const handles = new Map<string, HTMLElement>();
  let leftEdge = 0;

  const create = (end: End): HTMLElement => {
    const handle = make('div', `laneEnd ${end.kind} ${end.end}`);
    handle.tabIndex = 0;
    handle.setAttribute('role', 'slider');
    handle.style.color = cssColour(barStrokes[end.kind].variables);
    let offset: number | null = null;
    const fromLeft = (event: PointerEvent) => event.clientX - area.getBoundingClientRect().left - leftEdge;
    handle.addEventListener('pointerdown', (event) => {
      if (event.button !== 0) return;
      offset = fromLeft(event) - Number(handle.dataset.pixel);
      handle.setPointerCapture(event.pointerId);
      handle.focus();
      event.preventDefault();
    });
    handle.addEventListener('pointermove', (event) => {
      if (offset !== null) actions.drag(end, fromLeft(event) - offset);
    });
    handle.addEventListener('pointerup', () => {
      if (offset !== null) actions.finish();
      offset = null;
    });
    handle.addEventListener('pointercancel', () => {
      if (offset !== null) actions.cancel();
      offset = null;
    });
    handle.addEventListener('keydown', (event) => {
      if (event.altKey || event.ctrlKey || event.metaKey) return;
      if (event.key === 'Escape') {
        offset = null;
        actions.cancel();
      } else if (!actions.key(end, event.key, event.shiftKey)) return;
      event.preventDefault();
      event.stopPropagation();
    });
    handle.addEventListener('keyup', (event) => {
      if (event.key !== 'Shift' && offset === null) actions.finish();
    });
    handle.addEventListener('blur', () => {
      if (offset === null) actions.finish();
    });
    handle.addEventListener('focus', () => {
      if (handle.classList.contains('outOfView')) actions.reach(end);
    });
    return handle;
  };

  return {
    place(ends, left, across) {
      leftEdge = left;
      const gone = new Set(handles.keys());
      for (const shown of ends) {
        const key = keyOf(shown.end);
        gone.delete(key);
        let handle = handles.get(key);
        if (handle === undefined) {
          handle = create(shown.end);
          handles.set(key, handle);
          area.append(handle);
        }
        update(handle, shown, left, across);
      }
      for (const key of gone) {
        handles.get(key)?.remove();
        handles.delete(key);
      }
    },
  };
}

function update(handle: HTMLElement, shown: ShownEnd, left: number, across: number): void {
  const { end, pixel, middle, sample, limits, label, valueText } = shown;
  const box = gripBox(end, Math.min(across, Math.max(0, pixel)));
  handle.dataset.pixel = String(pixel);
  handle.classList.toggle('outOfView', pixel < -1 || pixel > across + 1);
  handle.style.left = `${left + box.left}px`;
  handle.style.width = `${box.width}px`;
  handle.style.top = `${middle - barRow / 2}px`;
  handle.style.height = `${barRow}px`;
  const attributes = {
    'aria-label': label,
    'aria-valuemin': String(limits.min),
    'aria-valuemax': String(limits.max),
    'aria-valuenow': String(sample),
    'aria-valuetext': valueText,
  };
  for (const [name, value] of Object.entries(attributes)) {
    if (handle.getAttribute(name) !== value) handle.setAttribute(name, value);
  }
}
