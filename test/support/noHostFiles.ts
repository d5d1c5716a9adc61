import type { HostCalls } from '../../core/protocol/messages';

/** For workers on a Node host, which ask the host for no file of the local disk. */
export const noHostFiles: HostCalls = {
  stat: async () => 'unreadable',
  read: async () => {
    throw new Error('local files are read by the worker itself');
  },
};
