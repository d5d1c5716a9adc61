import { type Finding, finding } from '../findings/finding';
import type { IntegerFormat } from './scaling';
import { integerFormat, type TargetFilter } from './targetFilter';
import { worstCase } from './worstCase';

/** What a bit-true run counted. */
export interface OverflowCounts {
  accumulatorOverflows: number;
  outputOverflows: number;
  samples: number;
}

/** Overflows that happened in the bit-true run, and those that the worst input could cause. */
export function overflowFindings(target: TargetFilter, counts: OverflowCounts): Finding[] {
  const format = integerFormat(target);
  if (format === null) return [];
  const findings: Finding[] = [];
  const { bits } = worstCase(target.values, format);
  const { accumulator } = format;
  if (counts.accumulatorOverflows > 0) {
    findings.push(
      finding(
        'overflow',
        {
          where: 'the accumulator',
          count: counts.accumulatorOverflows,
          samples: counts.samples,
          cure: overflowCure(format, bits),
        },
        { path: ['arithmetic', 'accumulator'] },
      ),
    );
  } else if (bits > accumulator) {
    findings.push(
      finding(
        'overflow-possible',
        { bits, accumulator, cure: overflowCure(format, bits) },
        { path: ['arithmetic', 'accumulator'] },
      ),
    );
  }
  if (counts.outputOverflows > 0) {
    findings.push(
      finding(
        'overflow',
        {
          where: 'the output word',
          count: counts.outputOverflows,
          samples: counts.samples,
          cure: 'A larger output.fullScale rules it out.',
        },
        { path: ['arithmetic', 'output'] },
      ),
    );
  }
  return findings;
}

/** What lets the worst case fit: each bit less in the taps or in the inputs takes one off it. */
function overflowCure({ accumulator, fractionBits, inputWord }: IntegerFormat, bits: number): string {
  const more = bits - accumulator;
  const cures: string[] = [];
  if (bits <= 64) cures.push(`an accumulator of ${bits} bits`);
  if (fractionBits >= more) cures.push(`at most ${fractionBits - more} fraction bits`);
  if (inputWord - more >= 2) {
    cures.push(`inputs shifted right by ${more} (input.word ${inputWord - more} at the same full scale)`);
  }
  if (cures.length === 0) return 'Take a shorter filter or shorter words.';
  const last = cures.pop();
  const list = cures.length === 0 ? last : `${cures.join(', ')} or ${last}`;
  return `To rule it out take ${list}.`;
}
