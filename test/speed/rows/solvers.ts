import { newPace } from '../../../core/pace';
import { type NormalSystem, normalSystem } from '../../../core/solvers/normalSystem';
import { methodFor, prepare } from '../../../core/solvers/prepare';
import { refine } from '../../../core/solvers/refine';
import { emptySums, type NormalSums } from '../../../core/statistics/normalSums';
import { sumStretch } from '../../../core/statistics/sumStretch';
import { normals } from '../../support/random';
import { writeDoubles } from '../data';
import { runReference } from '../python';
import { type Row, timed } from '../row';

const samples = 60_000;

/** Solutions before the first that is timed, so that its code is compiled, as it is in an editor session. */
const before = 100;

/** A coloured input: second-order, with a spectrum of some 40 dB. */
function coloured(seed: number): Float64Array {
  const x = normals(seed, samples);
  for (let n = 2; n < samples; n++) x[n] += 1.2 * x[n - 1] - 0.6 * x[n - 2];
  return x;
}

async function covarianceSums(inputs: number, length: number): Promise<NormalSums> {
  const x = Array.from({ length: inputs }, (_, r) => coloured(20 + r));
  const d = normals(50, samples).map((v, n) => v + x.reduce((sum, row) => sum + (row[n - 3] ?? 0), 0));
  const sums = emptySums(inputs, length);
  const more = await sumStretch(
    async (from, to, history = 0) => ({
      inputs: x.map((row) => row.subarray(from - history, to)),
      desired: d.subarray(from, to),
    }),
    { from: length - 1, to: samples },
    inputs,
    length,
    true,
    newPace(),
  );
  return Object.assign(sums, more, { count: samples - length + 1 });
}

const stored = new Map<string, NormalSums>();

function covarianceRow(inputs: number, length: number, goal: number): Row {
  const name = inputs === 1 ? `covariance${length}` : `covariance${inputs}x${length}`;
  const of = inputs === 1 ? '' : `${inputs} inputs × `;
  return {
    name: `\`covariance\`, ${of}${length.toLocaleString('en')} taps; NumPy shift updates + \`cho_factor\` + \`cho_solve\``,
    goal,
    async prepare(folder) {
      const sums = await covarianceSums(inputs, length);
      stored.set(name, sums);
      const [edge] = sums.edges;
      const parts = [
        Float64Array.of(inputs, length),
        ...sums.correlations.flat(),
        ...edge.before,
        ...edge.after,
        ...sums.cross,
      ];
      writeDoubles(folder, `${name}.f64`, Float64Array.from(parts.flatMap((part) => Array.from(part))));
    },
    ours: () =>
      timed(() => {
        const sums = stored.get(name);
        if (sums === undefined) throw new Error('not prepared');
        const powers = sums.correlations.map((row, r) => row[r][0] / sums.count);
        solveOnce(normalSystem(sums, powers));
      }),
    reference: (folder) => runReference(name, folder),
  };
}

function toeplitzRow(length: number, goal: number, warm = false): Row {
  let column = new Float64Array(0);
  let right: Float64Array = new Float64Array(0);
  const solution = () => {
    const scale = new Float64Array(length).fill(1);
    solveOnce({ size: length, right, scale, matrix: { toeplitz: column } });
  };
  return {
    name: `\`autocorrelation\`, ${length.toLocaleString('en')} taps${warm ? `, after ${before} others` : ''}; \`solve_toeplitz\``,
    goal,
    prepare(folder) {
      const x = coloured(7);
      column = new Float64Array(length);
      for (let k = 0; k < length; k++) {
        let sum = 0;
        for (let n = k; n < samples; n++) sum += x[n] * x[n - k];
        column[k] = sum / samples;
      }
      right = normals(8, length);
      writeDoubles(folder, `toeplitz${length}.f64`, column);
      writeDoubles(folder, `right${length}.f64`, right);
      if (warm) for (let k = 0; k < before; k++) solution();
    },
    ours: () => timed(solution),
    reference: (folder) => runReference(`toeplitz${length}`, folder),
  };
}

/** As the reference does it: the solution, refined, and no condition number. */
function solveOnce(system: NormalSystem): void {
  const prepared = prepare(methodFor(system), system, 0);
  if ('order' in prepared) throw new Error('not solved');
  const { multiply, inverse, refinements } = prepared;
  refine(multiply, inverse, system.right, refinements);
}

export const solverRows: Row[] = [
  toeplitzRow(1024, 0.6, true),
  toeplitzRow(4096, 0.6),
  toeplitzRow(16384, 0.1),
  covarianceRow(1, 1024, 0.3),
  covarianceRow(1, 4096, 0.15),
  covarianceRow(3, 1024, 0.4),
];
