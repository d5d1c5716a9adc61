export type Path = readonly (string | number)[];

/** Paths as keys of a map. */
export function pathKey(path: Path): string {
  return path.join('/');
}

/** True where `path` is `start` or lies inside it. */
export function startsWith(path: Path, start: Path): boolean {
  return start.length <= path.length && start.every((key, i) => key === path[i]);
}

/**
 * The place that shows a value: the longest of `places` that the path is or lies inside; where there is none, the first
 * that lies inside the path, unless the path is the whole document.
 */
export function nearestPlace<P extends Path>(places: Iterable<P>, path: Path): P | null {
  let best: P | null = null;
  let inside: P | null = null;
  for (const place of places) {
    if (startsWith(path, place) && (best === null || place.length > best.length)) best = place;
    else if (inside === null && path.length > 0 && startsWith(place, path)) inside = place;
  }
  return best ?? inside;
}

/** The value at a path of plain objects and lists; undefined where there is none. */
export function valueAt(root: unknown, path: Path): unknown {
  let value = root;
  for (const key of path) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = (value as Record<string | number, unknown>)[key];
  }
  return value;
}
