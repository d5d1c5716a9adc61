import type { Envelope, ToPage } from '../core/protocol/messages';
import { unpack } from '../core/protocol/pack';
import { newBanners } from './banners';
import type { PageContext, Section } from './context';
import { defineControls } from './controls';
import { newEdits } from './edits';
import { el } from './elements';
import { newFieldBook } from './form/fieldBook';
import { joinHost } from './host';
import { newKeeper } from './keeper';
import { pathsOf } from './leads';
import { leadTo } from './leadTo';
import { newOutcome } from './outcome';
import { isBroken } from './readable';
import { newDesign } from './sections/design';
import { newEmptyState } from './sections/empty';
import { newEvidence } from './sections/evidence';
import { newFirmware } from './sections/firmware';
import { newRecording } from './sections/recording';
import { newRecordings } from './sections/recordings';
import { newSuitability } from './sections/suitability';
import { allFindings, hear, newState } from './state';
import { newStrip } from './strip';
import { setWords, t } from './words';

/** The page: joins the host, builds the sections once it says hello, and follows its messages in the order they come. */
function start(): void {
  let state = newState();
  let page: ReturnType<typeof build> | null = null;
  const edits = newEdits();
  const { host, workbench } = joinHost(receive);
  const keeper = newKeeper(workbench.getState(), (kept) => workbench.setState(kept));
  let fillable = true;

  const context: PageContext = {
    calls: host.call,
    edit(changes) {
      if (changes.length === 0) return;
      if (isBroken(state)) {
        context.fail(t('The text is broken. Mend it as text first.'));
        return;
      }
      const edit = edits.next(changes);
      host.call.edit(edit).catch((error) => {
        edits.failed(edit.number);
        context.fail(error);
        page?.update(true);
      });
    },
    fields: newFieldBook(),
    keeper,
    state: () => state,
    envelope: async (request) => unpack<Envelope>(await host.call.envelope(request)),
    leadTo: (found) => leadTo(found, context, () => page?.lanes ?? null),
    take: () => Math.max(0, Math.min(keeper.state.take, (state.form?.document.takes.length ?? 1) - 1)),
    chooseTake(take) {
      keeper.change({ take });
      page?.update(false);
    },
    write: () => page?.write(),
    fail: (error) => page?.fail(error instanceof Error ? error.message : String(error)),
  };

  function receive(message: ToPage): void {
    state = hear(state, message);
    if (message.type === 'hello') {
      setWords(message.words);
      edits.restart();
      document.documentElement.lang = message.locale;
      page ??= build(context, state.kind);
    }
    // Older echoes must not overwrite what was entered since.
    if (message.type === 'document') fillable = edits.accepts(message.answers);
    page?.update(message.type === 'document' && fillable);
    if (message.type === 'show') page?.lead(message.section);
  }

  defineControls();
  window.addEventListener('scroll', () => keeper.change({ scroll: window.scrollY }), { passive: true });
  host.call.ready(null).catch(context.fail);
}

function build(context: PageContext, kind: 'pairing' | 'recording') {
  const main = document.querySelector<HTMLElement>('#page') ?? el('main', { id: 'page' });
  if (!main.isConnected) document.body.append(main);
  const outcome = newOutcome(context, () => ({ strip, firmware }));
  const strip = newStrip(context, outcome.check);
  const banners = newBanners(context);
  const recordings = kind === 'pairing' ? newRecordings(context) : null;
  const recording = kind === 'recording' ? newRecording(context) : null;
  const firmware = recordings ? newFirmware(context) : null;
  const sections: Section[] = [strip, banners];
  if (recording) sections.push(recording);
  if (recordings && firmware) {
    sections.push(newEmptyState(context), recordings, newSuitability(context), newDesign(context));
    sections.push(newEvidence(context), firmware);
  }
  strip.element.append(banners.failure);
  main.replaceChildren(...sections.map(({ element }) => element));
  let scrolled = false;
  return {
    lanes: (recordings ?? recording)?.lanes ?? null,
    write: outcome.write,
    fail: banners.fail,
    update(fill: boolean) {
      const state = context.state();
      outcome.update(state);
      for (const section of sections) {
        // A bug in one section must not silence the strip and the others.
        try {
          section.update(state, fill);
        } catch (error) {
          console.error(error);
          context.fail(error);
        }
      }
      if (fill && state.readable && state.form !== null) context.fields.fill(state.form);
      context.fields.showFindings(pathsOf(allFindings(state), state.form));
      context.fields.setDisabled(isBroken(state));
      if (!scrolled && (state.form !== null || state.parts.recording)) {
        scrolled = true;
        requestAnimationFrame(() => window.scrollTo(0, context.keeper.state.scroll));
      }
    },
    lead(section: string) {
      const target = document.querySelector<HTMLElement>(`[data-section="${CSS.escape(section)}"]`);
      target?.scrollIntoView();
      target?.querySelector<HTMLElement>('h2')?.focus({ preventScroll: true });
    },
  };
}

start();
