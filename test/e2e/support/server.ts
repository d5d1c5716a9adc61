import { createReadStream, statSync } from 'node:fs';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join, posix } from 'node:path';
import { buildFileSystem } from './buildFileSystem';
import { type FolderCall, folderCalls, refusalOf } from './folderCalls';
import { packageFiles } from './packageFiles';
import { type PageOptions, workbenchPage } from './workbenchPage';

export interface ServerOptions extends PageOptions {
  /** The extension: its manifest lies here. */
  extension: string;
  /** The folder that stands for `/` of the test file system. */
  root: string;
  /** Of the web build. */
  build: string;
  /** 0 or left out: any that is free. */
  port?: number;
}

export interface TestServer {
  /** To open in a browser; the server answers this machine only. */
  address: string;
  close(): Promise<void>;
}

const types: Record<string, string> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.mjs': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ttf': 'font/ttf',
  '.wasm': 'application/wasm',
};

/** Serves the workbench, the extension as its package would hold it, and the files of a folder. */
export async function startServer(options: ServerOptions): Promise<TestServer> {
  const held = packageFiles(options.extension);
  const fileSystem = await buildFileSystem();
  const calls = folderCalls(options.root);
  const server = createServer((request, response) => {
    // Webviews and the extension host's worker are of other origins.
    response.setHeader('Access-Control-Allow-Origin', '*');
    response.setHeader('Cache-Control', 'no-store');
    answer(request, response).catch((error) => {
      response.writeHead(500).end(String(error));
    });
  });

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const { pathname, searchParams } = new URL(request.url ?? '/', 'http://localhost');
    const path = posix.normalize(decodeURIComponent(pathname));
    const below = (prefix: string) => (path.startsWith(prefix) ? path.slice(prefix.length) : null);
    const call = below('/files/');
    const extensionFile = below('/static/extension/');
    const buildFile = below('/static/build/');
    const ownFile = below('/static/fileSystem/');
    if (path === '/') {
      response.setHeader('Content-Type', types['.html']);
      response.end(workbenchPage(`e2e.localhost:${portOf(server)}`, options));
    } else if (call !== null) {
      await answerCall(Object.hasOwn(calls, call) ? calls[call] : undefined, searchParams, request, response);
    } else if (ownFile !== null && Object.hasOwn(fileSystem, ownFile)) {
      response.setHeader('Content-Type', types[extname(ownFile)]);
      response.end(fileSystem[ownFile]);
    } else if (extensionFile !== null && held(extensionFile)) {
      sendFile(join(options.extension, extensionFile), response);
    } else if (buildFile !== null) sendFile(join(options.build, buildFile), response);
    else response.writeHead(404).end();
  }

  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port ?? 0, '127.0.0.1', resolve);
  });
  return {
    address: `http://e2e.localhost:${portOf(server)}/`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

const portOf = (server: Server) => (server.address() as AddressInfo).port;

function sendFile(path: string, response: ServerResponse): void {
  const found = statSync(path, { throwIfNoEntry: false });
  if (!found?.isFile()) {
    response.writeHead(404).end();
    return;
  }
  response.setHeader('Content-Type', types[extname(path)] ?? 'application/octet-stream');
  createReadStream(path).pipe(response);
}

async function answerCall(
  call: FolderCall | undefined,
  parameters: URLSearchParams,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const pieces: Buffer[] = [];
  for await (const piece of request) pieces.push(piece as Buffer);
  if (request.method !== 'POST' || call === undefined) {
    response.writeHead(request.method === 'OPTIONS' ? 204 : 404).end();
    return;
  }
  try {
    const result = await call(parameters, Buffer.concat(pieces));
    response.end(result instanceof Uint8Array ? result : JSON.stringify(result));
  } catch (error) {
    response.writeHead(409).end(refusalOf(error));
  }
}
