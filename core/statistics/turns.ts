const quarterTurn = 1.5707963267948966;

/**
 * `cos(2π turns)` to about 1 ulp from additions and multiplications in a fixed order, so that it is the same on every
 * platform: the fraction of a turn is brought to within an eighth, and a Taylor series of 10 terms does the rest.
 * @param turns any number below 2^50 or so; whole turns are taken off exactly
 */
export function cosineOfTurns(turns: number): number {
  return cosineAhead(turns, 0);
}

/** `sin(2π turns)`. */
export function sineOfTurns(turns: number): number {
  return cosineAhead(turns, 3);
}

/** The cosine some quarters of a turn ahead. */
function cosineAhead(turns: number, ahead: number): number {
  const quarters = 4 * (turns - Math.floor(turns));
  const nearest = Math.floor(quarters + 0.5);
  const rest = (quarters - nearest) * quarterTurn;
  switch ((nearest + ahead) % 4) {
    case 0:
      return series(rest, 1, 1);
    case 1:
      return -series(rest, rest, 2);
    case 2:
      return -series(rest, 1, 1);
    default:
      return series(rest, rest, 2);
  }
}

/** Taylor's series from its first term on, `first` (1 for the cosine, x for the sine) with factorials from `from`. */
function series(x: number, first: number, from: number): number {
  let term = first;
  let sum = first;
  for (let k = from; k < from + 22; k += 2) {
    term *= -(x * x) / (k * (k + 1));
    sum += term;
  }
  return sum;
}
