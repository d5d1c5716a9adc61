import { type FindingCode, sentences } from './sentences';

/** How much a finding weighs: a blocker stops the design, a caution asks for judgement, a note informs. */
export type Severity = 'blocker' | 'caution' | 'note';

/** Where a finding is: any of these, as far as it is known. Samples are a half-open range `[from, to)`. */
export interface Place {
  file?: string;
  take?: string;
  channel?: string;
  from?: number;
  to?: number;
  /** Line of a text recording, from 1. */
  line?: number;
  /** Keys that lead to the value in the pairing document, for example `['takes', 0, 'fit']`. */
  path?: readonly (string | number)[];
}

export type FindingValue = string | number;

export interface Finding extends Place {
  code: FindingCode;
  severity: Severity;
  /** What the sentence of this code has in braces. */
  values: Readonly<Record<string, FindingValue>>;
}

/**
 * A finding of the given code with the severity that its table row names, unless another is given.
 * @param values one entry for each name in braces in the row's sentence
 */
export function finding(
  code: FindingCode,
  values: Readonly<Record<string, FindingValue>> = {},
  place: Place = {},
  severity: Severity = sentences[code].severity,
): Finding {
  return { code, severity, ...place, values };
}

/** Carries blockers from where they are found to the entry of the pipeline. Not a bug: a bug throws anything else. */
export class Refusal extends Error {
  constructor(readonly findings: readonly Finding[]) {
    super(findings.map((f) => f.code).join(', '));
    this.name = 'Refusal';
  }
}

/** Throws a {@link Refusal} with one finding. */
export function refuse(
  code: FindingCode,
  values: Readonly<Record<string, FindingValue>> = {},
  place: Place = {},
): never {
  throw new Refusal([finding(code, values, place, 'blocker')]);
}

/** True where any of the findings stops the design. */
export function blocked(findings: readonly Finding[]): boolean {
  return findings.some((f) => f.severity === 'blocker');
}

const order: Record<Severity, number> = { blocker: 0, caution: 1, note: 2 };

/** The same findings, worst first, otherwise in the order found. */
export function worstFirst(findings: readonly Finding[]): Finding[] {
  return [...findings].sort((a, b) => order[a.severity] - order[b.severity]);
}
