import type { NewSha256 } from '../../core/bytes/sha256';
import { jobs } from '../../core/document/pairingDocument';
import { finding, Refusal } from '../../core/findings/finding';
import { newPace } from '../../core/pace';
import { check } from '../../core/pipeline/check';
import { draftPair } from '../../core/pipeline/draftPair';
import { failureCodes, type Host } from '../../core/pipeline/host';
import { keepNothing, newKeep } from '../../core/pipeline/keep';
import { nothingSeen, stillStands, writtenState } from '../../core/pipeline/writtenState';
import type { HostCalls, RecordingHead, Root, WorkerCalls } from '../../core/protocol/messages';
import { pack } from '../../core/protocol/pack';
import { link, type Port, type Remote } from '../../core/protocol/rpc';
import { openRecording } from '../../core/recordings/openRecording';
import { channelEntry } from '../../core/recordings/recording';
import { findingView } from '../../core/view/findingView';
import { excerptOf } from './excerpt';
import { hostFiles } from './hostFiles';
import { envelopeOf } from './lanes';
import { newPrecedence } from './precedence';
import type { RootFiles } from './rootFiles';
import { sameRecordings } from './sameRecordings';
import { newSession, type Session } from './session';

/** What a worker has of the place it runs in. */
export interface Surroundings {
  /** Null: only the extension host can read local files. */
  localFiles: ((folder: string) => RootFiles) | null;
  newSha256: NewSha256;
}

/** Digests kept; each is small. */
const mostDigests = 1000;

/** Answers everything that the extension host asks of its worker, over a port. */
export function serve(port: Port, { localFiles, newSha256 }: Surroundings): void {
  const sessions = new Map<string, Session>();
  const openRoot = (root: Root): RootFiles => {
    if (root.kind === 'host') return hostFiles(end.call, root.uri);
    if (localFiles === null) throw new Error('local files cannot be read here');
    return localFiles(root.folder);
  };
  const precedence = newPrecedence();
  const sessionOf = (name: string): Session => {
    const known = sessions.get(name);
    if (known !== undefined) return known;
    const made = newSession(name, openRoot, newSha256, precedence, (notice, transfer) =>
      end.tell(notice, transfer),
    );
    sessions.set(name, made);
    return made;
  };
  /** Work by itself, with files of its own. */
  const apart = async <T>(root: Root, work: (host: Host) => Promise<T>): Promise<T> => {
    const files = openRoot(root);
    try {
      return await work({ open: files.open, newSha256, pace: newPace(), keep: keepNothing });
    } finally {
      await files.close();
    }
  };

  /** Recordings that several pairings share are digested once. */
  const digests = newKeep(mostDigests);

  const calls: WorkerCalls = {
    async update(request) {
      await sessionOf(request.session).update(request);
      return null;
    },
    async inspect(request) {
      await sessionOf(request.session).inspect(request);
      return null;
    },
    async envelope({ session, ...request }) {
      const { urgent, left } = sessionOf(session);
      return pack(await urgent(() => envelopeOf(left, request, newPace())));
    },
    async excerpt({ session, ...request }) {
      const { urgent, left } = sessionOf(session);
      return pack(await urgent(() => excerptOf(left, request, newPace())));
    },
    files: async ({ session, generation }) => sessionOf(session).files(generation),
    check: ({ root, text, place }) =>
      apart(root, async (host) => {
        const { state, findings } = await check(host, text, place);
        return { state, findings: findings.map((found) => findingView(found, text)) };
      }),
    written: ({ root, place, seen }) =>
      apart(root, async (host) => {
        if (seen !== null && (await stillStands(host, seen))) return null;
        const ofRoot: Host = { ...host, keep: (stage, key, make) => digests(stage, [root, key], make) };
        const { findings, text, ...state } = await writtenState(ofRoot, place, seen ?? nothingSeen);
        return { ...state, findings: findings.map((found) => findingView(found, text)) };
      }),
    sameRecordings: ({ root, ...wanted }) => apart(root, (host) => sameRecordings(host, wanted)),
    heads: ({ root, paths }) => apart(root, (host) => Promise.all(paths.map((path) => headOf(host, path)))),
    draft: ({ root, job, ...request }) =>
      apart(root, async (host) => {
        try {
          const known = jobs.find((name) => name === job) ?? null;
          return { text: (await draftPair(host, { ...request, job: known, length: null })).text };
        } catch (error) {
          if (!(error instanceof Refusal)) throw error;
          return { findings: error.findings.map((found) => findingView(found, null)) };
        }
      }),
    async stop({ session }) {
      sessions.get(session)?.stop();
      return null;
    },
    async forget({ session }) {
      const known = sessions.get(session);
      sessions.delete(session);
      await known?.close();
      return null;
    },
  };
  const end: { call: Remote<HostCalls>; tell(notice: unknown, transfer?: ArrayBuffer[]): void } = link<
    HostCalls,
    WorkerCalls
  >(port, calls);
}

async function headOf(host: Host, path: string): Promise<RecordingHead> {
  const source = await host.open(path);
  const { recording, findings } =
    typeof source === 'string'
      ? { recording: null, findings: [finding(failureCodes[source], {}, { file: path })] }
      : await openRecording(source, path, host.pace);
  const problems = findings
    .filter(({ severity }) => severity === 'blocker')
    .map((found) => findingView(found, null));
  return {
    path,
    samples: recording?.samples ?? 0,
    sampleRate: recording?.sampleRate ?? null,
    channels: recording === null ? [] : recording.channels.map((_, c) => channelEntry(recording, c)),
    problems,
  };
}
