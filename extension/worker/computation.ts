import { designFiles } from '../../core/files/designFiles';
import type { Finding } from '../../core/findings/finding';
import { worstFirst } from '../../core/findings/finding';
import { changeAgainst } from '../../core/pipeline/changeAgainst';
import { choose } from '../../core/pipeline/choose';
import { design } from '../../core/pipeline/design';
import type { DesignResult } from '../../core/pipeline/designResult';
import type { Fit } from '../../core/pipeline/fitPair';
import type { Host } from '../../core/pipeline/host';
import { inspectPairing } from '../../core/pipeline/inspect';
import type { DocumentPlace, ReadPairing } from '../../core/pipeline/pairing';
import { type QuickStatistics, quickFigures } from '../../core/pipeline/quickFigures';
import { measureKey } from '../../core/pipeline/stageKeys';
import type { FiguresView, Part, Views } from '../../core/protocol/views';
import { choiceView } from '../../core/view/choiceView';
import { evidenceView } from '../../core/view/evidenceView';
import { figuresView, quickView } from '../../core/view/figuresView';
import { firmwareView } from '../../core/view/firmwareView';
import { recordingsView } from '../../core/view/recordingsView';
import { suitabilityView } from '../../core/view/suitabilityView';
import { plannedFiles } from './plannedFiles';

/** What a computation leaves behind for questions that come later. */
export interface Computed {
  read: ReadPairing | null;
  fit: Fit | null;
  result: DesignResult | null;
  /** `result` is of the newest text: until there is one, and where it was stopped, that of the text before stands there. */
  current?: boolean;
  /** What the last exact figures depend on. */
  measured: string | null;
  quick: QuickStatistics | null;
  /** Whether figures have taken long, so that the next ones are worth being made ready for. */
  slow: boolean;
}

/** Where the parts go; null: cannot be had. */
export type Send = <P extends Part>(part: P, view: Views[P] | null) => void;

/** Milliseconds from which a changed filter gets its figures from sums made ready before. */
const slowFigures = 100;

/** Called when work on a part begins, so that progress is shown where it belongs. */
export type Begin = (part: Part) => void;

/**
 * Computes a pairing part by part, what a change is made for first.
 * @param left filled in as stages are done
 */
export async function compute(
  host: Host,
  text: string,
  place: DocumentPlace,
  left: Computed,
  send: Send,
  begin: Begin,
): Promise<void> {
  left.current = false;
  let began = 0;
  begin('recordings');
  let figures: FiguresView | null = null;
  const designed = await design(host, text, place, {
    read(read) {
      left.read = read;
      send('recordings', recordingsView(read));
      began = performance.now();
      const { pairing } = read;
      const known = pairing !== null && left.measured === JSON.stringify(measureKey(pairing));
      const quick = pairing === null || known ? null : quickFigures(pairing, left.quick);
      if (pairing !== null && quick !== null) send('figures', quickView(pairing, quick));
      begin('figures');
    },
    measured(pairing, fit, measured) {
      left.fit = fit;
      left.measured = JSON.stringify(measureKey(pairing));
      left.slow ||= performance.now() - began > slowFigures;
      figures = figuresView(pairing, fit, measured);
      send('figures', figures);
      begin('suitability');
    },
    inspected: () => begin('evidence'),
    evaluated(result) {
      const labels = [...result.inputs, result.desired];
      const bands = result.heldOut?.bands ?? [];
      send('suitability', suitabilityView(result.findings, text, result.inspection, bands, labels));
      if (figures !== null) send('evidence', evidenceView(result, figures));
      begin('firmware');
    },
  });
  const { result, findings } = designed;
  left.result = result;
  left.current = true;
  if (result === null || figures === null) {
    for (const part of ['figures', 'evidence', 'firmware'] as const) send(part, null);
    await inspectOnly(host, text, place, findings, send, begin);
  } else {
    await sendFirmware(host, place, result, send);
  }
  begin('choice');
  await sendChoice(host, text, place, send);
}

/** What can still be said of the pair where no design came of it. */
async function inspectOnly(
  host: Host,
  text: string,
  place: DocumentPlace,
  earlier: readonly Finding[],
  send: Send,
  begin: Begin,
): Promise<void> {
  begin('suitability');
  const { pair, labels } = await inspectPairing(host, text, place);
  const findings = pair === null ? [...earlier] : worstFirst([...earlier, ...pair.findings]);
  send('suitability', suitabilityView(findings, text, pair, [], labels));
}

async function sendFirmware(
  host: Host,
  place: DocumentPlace,
  result: DesignResult,
  send: Send,
): Promise<void> {
  const files = designFiles(result, host.newSha256);
  const planned = await plannedFiles(host, place.folder, files);
  const taps = files[files.length - 1].path;
  const change = await changeAgainst(host, place.folder, taps, result);
  send('firmware', firmwareView(result, files, planned, change));
}

/** Curves are sent on as they come, but not oftener than an eye can follow. */
const betweenCurves = 150;

async function sendChoice(host: Host, text: string, place: DocumentPlace, send: Send): Promise<void> {
  let last = 0;
  const { choice, findings } = await choose(host, text, place, (soFar, { document }) => {
    if (performance.now() - last < betweenCurves) return;
    last = performance.now();
    send('choice', choiceView(soFar, document, null, [], text));
  });
  if (choice === null) send('choice', null);
  else send('choice', choiceView(choice.search, choice.pairing.document, choice, findings, text));
}
