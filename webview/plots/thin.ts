/**
 * The points that a screen of `columns` can show, as rising indices: of each column the first and last point and the
 * lowest and highest of every series, so that no peak is lost; of a gap one point, so that it stays a gap.
 * @param column where point i falls; must not fall from point to point; NaN: the point is left out
 */
export function keptPoints(
  count: number,
  column: (index: number) => number,
  series: ArrayLike<number>[],
  columns: number,
): number[] {
  const kept: number[] = [];
  if (count <= 2 * columns) {
    for (let i = 0; i < count; i++) if (!Number.isNaN(column(i))) kept.push(i);
    return kept;
  }
  let here: number | null = null;
  let chosen = new Set<number>();
  let members: number[] = [];
  const close = () => {
    for (const values of series) for (const index of extremes(values, members)) chosen.add(index);
    if (members.length > 0) chosen.add(members[0]).add(members[members.length - 1]);
    kept.push(...[...chosen].sort((a, b) => a - b));
    chosen = new Set();
    members = [];
  };
  for (let i = 0; i < count; i++) {
    const place = Math.floor(column(i));
    if (Number.isNaN(place)) continue;
    if (place !== here) close();
    here = place;
    members.push(i);
  }
  close();
  return kept;
}

function extremes(values: ArrayLike<number>, members: number[]): number[] {
  let lowest = -1;
  let highest = -1;
  let gap = -1;
  for (const index of members) {
    const value = values[index];
    if (Number.isNaN(value)) gap = gap < 0 ? index : gap;
    else {
      if (lowest < 0 || value < values[lowest]) lowest = index;
      if (highest < 0 || value > values[highest]) highest = index;
    }
  }
  return [lowest, highest, gap].filter((index) => index >= 0);
}

/** At most `most` of `count` rows, spread evenly with the first and the last among them. */
export function evenRows(count: number, most: number): number[] {
  if (count <= most) return Array.from({ length: count }, (_, i) => i);
  if (most < 2) return [0];
  return Array.from({ length: most }, (_, i) => Math.round((i * (count - 1)) / (most - 1)));
}
