import { jobWords } from '../figures/jobWords';
import { duration, frequency } from '../figures/units';
import type { DesignResult } from '../pipeline/designResult';
import { asciiText, wrapped } from './asciiText';
import { firmwareSteps } from './firmwareSteps';

/** Lines of the comment at the head of the coefficients in any language: what they are and how the firmware runs them. */
export function headComment(result: DesignResult): string[] {
  const { document, takes, sampleRate } = result;
  const source = ({ file, channel }: { file: string; channel: string }) =>
    `${asciiText(file)}, channel ${asciiText(channel)}`;
  const steps = firmwareSteps(result, { name: (text) => `"${asciiText(text)}"`, formula: (text) => text });
  return [
    ...wrapped(asciiText(document.title), 96),
    `Coefficients of an FIR filter for ${jobWords[document.job]}.`,
    '',
    'Inputs x, one row of coefficients each, and desired signal d:',
    ...takes[0].inputs.map((input, r) => `  ${r}  ${source(input)}`),
    `  d  ${source(takes[0].desired)}`,
    '',
    `At every sample n (${frequency(sampleRate)}, every ${duration(1 / sampleRate)}):`,
    ...steps.flatMap((step, i) => numbered(i + 1, step)),
  ];
}

function numbered(number: number, text: string): string[] {
  return wrapped(text, 90).map((line, i) => `${i === 0 ? `${number}.`.padStart(4) : '    '} ${line}`);
}
