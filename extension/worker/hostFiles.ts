import { memorySource } from '../../core/bytes/byteSource';
import type { HostCalls } from '../../core/protocol/messages';
import type { Remote } from '../../core/protocol/rpc';
import { keptFiles, type RootFiles } from './rootFiles';

/** Files that only the extension host can read, each whole, when its first byte is asked for. */
export function hostFiles(host: Remote<HostCalls>, uri: string): RootFiles {
  const sizes = new Map<string, number>();
  return keptFiles({
    async stamp(path) {
      const about = await host.stat({ uri, path });
      if (typeof about === 'string') return about;
      sizes.set(path, about.size);
      return { stamp: about.stamp };
    },
    async open(path, stamp) {
      let whole: ReturnType<typeof memorySource> | null = null;
      return {
        size: sizes.get(path) ?? 0,
        stamp,
        async read(offset, length) {
          whole ??= memorySource(await host.read({ uri, path }));
          return whole.read(offset, length);
        },
      };
    },
  });
}
