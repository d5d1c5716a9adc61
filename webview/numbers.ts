import { count } from './figures';
import { t } from './words';

/** What a number field takes. */
export interface NumberRule {
  min: number;
  max: number;
  whole?: boolean;
  /** `min` itself is refused. */
  above?: boolean;
  /** An empty field stands for null. */
  optional?: boolean;
}

export type Checked<T> = { value: T } | { error: string };

const form = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i;

/** What may be a thousand as the page shows it, or a decimal comma. */
const thousands = /^[+−–-]?[1-9]\d{0,2},\d{3}$/;
const dottedThousands = /^[+−–-]?[1-9]\d{0,2}\.\d{3}$/;

/** The number of a text, with a decimal point or comma and no separators between thousands; null where it is none. */
export function parseNumber(text: string): number | null {
  const plain = text.trim().replace(/^[−–]/, '-').replace(/e[−–]/i, 'e-');
  if (!form.test(plain)) return null;
  const value = Number(plain.replace(',', '.'));
  return Number.isFinite(value) ? value : null;
}

/** The value of a number field, or a sentence that says what is wrong with its text. */
export function checkNumber(text: string, rule: NumberRule): Checked<number | null> {
  const got = text.trim();
  if (got === '') {
    return rule.optional ? { value: null } : { error: t('Nothing is given when a number is expected.') };
  }
  const value = parseNumber(got);
  const read = thousands.test(got) || (rule.whole && dottedThousands.test(got));
  if (value !== null && read) return { error: ambiguous(got, rule) };
  if (value === null) return { error: t('Got {0} when a number is expected.', got) };
  if (rule.whole && !Number.isInteger(value)) {
    return { error: t('Got {0} when a whole number is expected.', got) };
  }
  const low = rule.above ? value <= rule.min : value < rule.min;
  if (low || value > rule.max) return { error: t('Got {0} when {1} is expected.', got, rangeInWords(rule)) };
  return { value: value === 0 ? 0 : value };
}

function ambiguous(got: string, { whole }: NumberRule): string {
  const joined = got.replace(/[.,]/, '');
  return whole
    ? t('Got {0} when a whole number without separators is expected: {1}.', got, joined)
    : t('{0} can be read in two ways. Write {1} or {2}.', got, joined, got.replace(',', '.'));
}

/** Several numbers between semicolons or blanks; commas are decimal. Null where the field is empty. */
export function checkNumbers(text: string, rule: NumberRule): Checked<number[] | null> {
  const parts = text.split(/[;\s]+/).filter((part) => part !== '');
  if (parts.length === 0) return { value: null };
  const values: number[] = [];
  for (const part of parts) {
    const checked = checkNumber(part, rule);
    if ('error' in checked) return checked;
    values.push(checked.value!);
  }
  return { value: values };
}

/** `1 to 65,536`, `0 or more`, `above 0`. */
export function rangeInWords({ min, max, above }: NumberRule): string {
  const open = max > 1e11;
  if (above)
    return open ? t('a number above {0}', shown(min)) : t('above {0}, up to {1}', shown(min), shown(max));
  if (open && min < -1e11) return t('any number');
  return open ? t('{0} or more', shown(min)) : t('{0} to {1}', shown(min), shown(max));
}

/** A number as it stands in a field: all its digits, with an exponent where it is small or large. */
export function fieldText(value: number | null): string {
  if (value === null) return '';
  const size = Math.abs(value);
  if (value !== 0 && (size < 1e-3 || size >= 1e15)) return value.toExponential().replace('e+', 'e');
  return String(value);
}

function shown(value: number): string {
  return Number.isInteger(value) && Math.abs(value) < 1e7 ? count(value) : fieldText(value);
}
