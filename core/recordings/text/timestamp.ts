// Date and time of ISO 8601 with a blank or T between them and an optional zone.
const pattern = /^(\d{4})-(\d\d)-(\d\d)[T ](\d\d):(\d\d)(?::(\d\d)(?:[.,](\d{1,12}))?)?(Z|[+-]\d\d:?\d\d)?$/;

/** Whether a cell is a date and time. */
export function isTimestamp(cell: string): boolean {
  return pattern.test(cell);
}

/** A date and time, in whole seconds since 1970-01-01 and the fraction of a second. */
export interface Timestamp {
  seconds: number;
  fraction: number;
}

/** Reads a date and time; undefined where it is none or no such day exists. Zones are taken off; leap seconds count as the next. */
export function parseTimestamp(cell: string): Timestamp | undefined {
  const match = pattern.exec(cell);
  if (match === null) return undefined;
  const [year, month, day, hour, minute, second] = match.slice(1, 7).map((part) => Number(part ?? 0));
  if (
    month < 1 ||
    month > 12 ||
    day < 1 ||
    day > daysIn(year, month) ||
    hour > 24 ||
    (hour === 24 && (minute > 0 || second > 0 || Number(match[7] ?? 0) > 0)) ||
    minute > 59 ||
    second > 60
  ) {
    return undefined;
  }
  const clock = 3600 * hour + 60 * minute + second;
  return {
    seconds: 86400 * dayNumber(year, month, day) + clock - zoneSeconds(match[8]),
    fraction: match[7] === undefined ? 0 : Number(`0.${match[7]}`),
  };
}

function isLeap(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
}

function daysIn(year: number, month: number): number {
  return month === 2 ? (isLeap(year) ? 29 : 28) : [4, 6, 9, 11].includes(month) ? 30 : 31;
}

/** Days since 1970-01-01 of the Gregorian calendar. */
function dayNumber(year: number, month: number, day: number): number {
  const before = year - 1;
  let days = 365 * before + Math.floor(before / 4) - Math.floor(before / 100) + Math.floor(before / 400);
  for (let m = 1; m < month; m++) days += daysIn(year, m);
  return days + day - 1 - 719162;
}

function zoneSeconds(zone: string | undefined): number {
  if (zone === undefined || zone === 'Z') return 0;
  const seconds = 3600 * Number(zone.slice(1, 3)) + 60 * Number(zone.slice(-2));
  return zone.startsWith('-') ? -seconds : seconds;
}
