// The same page and the same engine as in Electron, behind a server that only this computer can reach.
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { decodeText, encodeFrame } from '../../contract/frame.ts';
import type { Answer } from '../../contract/requests.ts';
import type { EngineClient } from '../engine-client.ts';
import { pageHeaders, readPage } from '../pages.ts';
import { readBody } from './body.ts';
import { withRealPaths } from './notebook-paths.ts';
import { StartFolder } from './start-folder.ts';
import { Tabs, type Tab } from './tabs.ts';

/** An answer that takes longer comes by the stream: a browser has only six connections to a server. */
const answerWithin_ms = 500;
/** So that a tab which vanished without a word is noticed. */
const heartbeat_ms = 15_000;

export interface ServeOptions {
  /** The built page. */
  readonly pages: string;
  readonly client: EngineClient;
  readonly startFolder: string;
  /** How long to stay after the last tab closed. */
  readonly linger_ms?: number;
}

export interface Served {
  /** "http://127.0.0.1:PORT/", good for nothing without a code. */
  readonly address: string;
  /** The address with a fresh code, which opens one tab, once. Calls back when that happens. */
  readonly newAddress: (onUse?: () => void) => string;
  /** Settles once the server has closed, by `close` or because no tab is left. */
  readonly closed: Promise<void>;
  readonly close: () => Promise<void>;
}

/** Serves on a random port of 127.0.0.1. @throws Error when the start folder does not exist. */
export async function serve({ pages, client, startFolder, linger_ms = 60_000 }: ServeOptions): Promise<Served> {
  const tabs = new Tabs();
  const folder = new StartFolder(startFolder);
  let host = '';

  const server = createServer((request, response) => {
    reply(request, response)
      .then((made) => made && response.writeHead(made.status, made.headers).end(made.body))
      .catch(() => response.destroy());
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  host = `127.0.0.1:${(server.address() as AddressInfo).port}`;

  /** Null: the response stays open. */
  async function reply(request: IncomingMessage, response: ServerResponse): Promise<Reply | null> {
    // Another site that points a name of its own at 127.0.0.1 shows up here.
    if (request.headers.host !== host) return plain(403, 'Unknown host');
    const { pathname } = new URL(request.url ?? '/', `http://${host}`);
    // Asked for by itself where a page names no icon; a 404 would stand in the console as an error.
    if (pathname === '/favicon.ico') return { status: 204, headers: pageHeaders, body: '' };
    if (request.method === 'GET') return readPage(pages, pathname);
    if (request.method !== 'POST') return plain(405, 'Only GET and POST');
    if (request.headers.origin !== `http://${host}`) return plain(403, 'Unknown origin');
    if (request.headers['content-type'] !== 'application/json') return plain(415, 'Only application/json');
    if (pathname === '/enter') return enter(request);
    const tab = tabs.find(request.headers.authorization);
    if (!tab) return plain(401, 'This tab was not let in');
    if (!tab.requests.take()) return plain(429, 'Too many requests');
    if (pathname === '/ask') return ask(tab, request);
    if (pathname === '/folder') return list(request);
    if (pathname !== '/stream') return plain(404, 'Not found');
    clearTimeout(leaving);
    response.writeHead(200, { ...pageHeaders, 'Content-Type': 'application/octet-stream' });
    response.flushHeaders();
    tabs.listen(tab, response);
    return null;
  }

  async function enter(request: IncomingMessage): Promise<Reply> {
    const body = await readBody(request, 'short');
    if (body === null) return plain(413, 'Too large');
    const entered = tabs.enter(field(decodeText(body), 'code'));
    if (entered === 'too many') return plain(429, 'Too many wrong codes');
    if (entered === 'wrong') return plain(401, 'This code has been used, or never was one');
    return frame(entered);
  }

  async function ask(tab: Tab, request: IncomingMessage): Promise<Reply> {
    const body = await readBody(request, 'long');
    if (body === null) return frame(tooLarge);
    const asked = decodeText(body);
    const call = field(asked, 'call');
    const name = field(asked, 'name');
    const placed = withRealPaths(folder, name, (asked as { question?: unknown }).question);
    if (!placed.ok) return frame(placed);
    const answer = client.relay(name, placed.value);
    const inTime = await Promise.race([answer, pause(answerWithin_ms)]);
    if (inTime) return frame(inTime);
    void answer.then((late) => tabs.send(tab, encodeFrame({ kind: 'answer', call, answer: late })));
    return { status: 202, headers: pageHeaders, body: '' };
  }

  async function list(request: IncomingMessage): Promise<Reply> {
    const body = await readBody(request, 'short');
    if (body === null) return plain(413, 'Too large');
    return frame(folder.list(field(decodeText(body), 'folder')));
  }

  const stopEvents = client.onEvent((event) => tabs.sendAll(encodeFrame({ kind: 'event', event })));
  const heartbeat = setInterval(() => tabs.sendAll(new Uint8Array(0)), heartbeat_ms);
  let leaving: NodeJS.Timeout | undefined;
  tabs.onLastClosed(() => {
    clearTimeout(leaving);
    leaving = setTimeout(() => void close(), linger_ms);
  });

  const closed = new Promise<void>((done) => server.once('close', done));
  function close(): Promise<void> {
    stopEvents();
    clearInterval(heartbeat);
    tabs.onLastClosed(() => undefined);
    clearTimeout(leaving);
    server.close();
    server.closeAllConnections();
    return closed;
  }
  const address = `http://${host}/`;
  return { address, newAddress: (onUse = () => undefined) => `${address}#${tabs.newCode(onUse)}`, closed, close };
}

const tooLarge: Answer = {
  ok: false,
  refusals: [
    {
      code: 'too-large',
      thing: 'request',
      place: 'browser shell',
      value: 'over 64 MB',
      remedy: 'use a smaller file',
    },
  ],
};

interface Reply {
  readonly status: number;
  readonly headers: Readonly<Record<string, string>>;
  readonly body: string | Uint8Array;
}

function plain(status: number, words: string): Reply {
  return { status, headers: { ...pageHeaders, 'Content-Type': 'text/plain', Connection: 'close' }, body: words };
}

function frame(value: unknown): Reply {
  const headers = { ...pageHeaders, 'Content-Type': 'application/octet-stream' };
  return { status: 200, headers, body: encodeFrame(value) };
}

/** A text field of what a page sent; "" when there is none. */
function field(value: unknown, name: string): string {
  const given = typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[name] : undefined;
  return typeof given === 'string' ? given : '';
}

const pause = (time_ms: number): Promise<null> => new Promise((done) => setTimeout(done, time_ms, null));
