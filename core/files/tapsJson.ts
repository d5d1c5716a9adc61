import { roundedDecibels } from '../figures/decibels';
import type { Finding } from '../findings/finding';
import { say } from '../findings/say';
import { comparableBands, comparableLimit } from '../pipeline/comparableLimit';
import type { DesignResult, ErrorFigure, HeldOutFigures, TakeSummary } from '../pipeline/designResult';
import { arithmeticJson } from './arithmeticJson';
import { choiceLinesJson } from './choiceLinesJson';
import { confidenceJson, residualsJson } from './confidenceJson';
import { filterCost } from './filterCost';
import { type Mark, markText } from './generatedMark';
import { inspectionJson } from './inspectionJson';
import { type Json, jsonText } from './jsonText';
import { openSelfDigest } from './selfDigest';
import { shapeJson, wordsJson } from './wordsJson';

/**
 * Text of `NAME.taps.json`: the full result for programs. Coefficients and fixed-point values are newest-first whatever the
 * order in the other files; decibels have two digits after the point; null stands for what is not there.
 * The key `self` is left open for `closeSelfDigest`.
 * @param files SHA-256 of every other file that is written, by its path from this file's folder
 */
export function tapsJson(result: DesignResult, mark: Mark, files: Readonly<Record<string, string>>): string {
  return jsonText({
    generated: markText(mark),
    taps: 1,
    ...resultJson(result),
    files: { ...files },
    self: openSelfDigest,
  });
}

/** The keys of `NAME.taps.json` that speak of the result; `--json` prints the same. */
export function resultJson(result: DesignResult): { [key: string]: Json } {
  const { document } = result;
  return {
    document: { file: result.documentFile, sha256: result.documentSha256 },
    title: document.title,
    job: document.job,
    sampleRate: result.sampleRate,
    inputs: [...result.inputs],
    desired: result.desired,
    filter: { ...document.filter, fixedGain: document.filter.fixedGain && { ...document.filter.fixedGain } },
    prepare: {
      removeMean: document.prepare.removeMean,
      band: document.prepare.band && { ...document.prepare.band },
    },
    recordings: result.recordings.map(({ file, sha256, format, sampleRate, samples, channels }) => ({
      file,
      sha256,
      format,
      sampleRate,
      samples,
      channels: [...channels],
    })),
    takes: result.takes.map(take),
    coefficients: result.coefficients.map((row) => Array.from(row)),
    means: { inputs: [...result.means.inputs], desired: result.means.desired },
    inputPowers: [...result.inputPowers],
    fit: figure(result.fit),
    heldOut: result.heldOut && heldOut(result.heldOut, result),
    method: result.method,
    conditionNumber: result.conditionNumber,
    confidence: confidenceJson(result),
    residuals: residualsJson(result),
    inspection: inspectionJson(result.inspection),
    choice: choiceLinesJson(result.choice),
    arithmetic: arithmeticJson(result),
    shape: shapeJson(result.shape),
    words: wordsJson(result),
    cost: { ...filterCost(result), cyclesPerMac: document.arithmetic.cyclesPerMac },
    write: { symbol: document.write.symbol, order: document.write.order },
    limits: { ...document.limits },
    findings: result.findings.map(findingJson),
  };
}

function take({ name, samples, inputs, desired, fit, heldOut, disturbanceOnly }: TakeSummary): Json {
  const intervals = (list: TakeSummary['fit']) => list.map(({ from, to }) => ({ from, to }));
  return {
    name,
    samples,
    inputs: inputs.map(({ file, channel }) => ({ file, channel })),
    desired: { file: desired.file, channel: desired.channel },
    fit: intervals(fit),
    heldOut: intervals(heldOut),
    disturbanceOnly: intervals(disturbanceOnly),
  };
}

function figure({ samples, mse, nmseDb }: ErrorFigure): { [key: string]: Json } {
  return { samples, mse, nmseDb: roundedDecibels(nmseDb) };
}

function heldOut(figures: HeldOutFigures, result: DesignResult): Json {
  const attainableBands = comparableBands(result);
  return {
    ...figure(figures),
    outsideBandDb: roundedDecibels(figures.outsideBandDb),
    disturbanceOnly: figures.disturbanceOnly,
    attainableDb: roundedDecibels(comparableLimit(result)),
    bands: figures.bands.map(({ from, to, reductionDb }, b) => ({
      from,
      to,
      reductionDb: roundedDecibels(reductionDb),
      attainableDb: roundedDecibels(attainableBands[b]),
    })),
    takes: figures.takes.map((of) => ({
      name: of.name,
      ...figure(of),
      standardErrorDb: roundedDecibels(of.standardErrorDb),
    })),
  };
}

/** A finding as files and `--json` show it: its code, severity and place, and the sentence. */
export function findingJson(found: Finding): { [key: string]: Json } {
  const { code, severity, file, take, channel, from, to, line, path } = found;
  const place = { file, take, channel, from, to, line, path: path && [...path] };
  const known: { [key: string]: Json } = {};
  for (const [key, value] of Object.entries(place)) if (value !== undefined) known[key] = value;
  return { code, severity, ...known, message: say(found) };
}
