import { type Finding, finding } from '../findings/finding';
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
          cure: `An accumulator of ${bits} bits, or ${bits - accumulator} fraction bits fewer, rules it out.`,
        },
        { path: ['arithmetic', 'accumulator'] },
      ),
    );
  } else if (bits > accumulator) {
    findings.push(
      finding('overflow-possible', { bits, accumulator }, { path: ['arithmetic', 'accumulator'] }),
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
