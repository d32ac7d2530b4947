import { randomBytes } from 'node:crypto';
import type { ServerResponse } from 'node:http';
import { Allowance } from './allowance.ts';

/** One tab of the browser: what it proves itself with, and the streams it listens on. */
export interface Tab {
  readonly requests: Allowance;
  /** Usually one; two where the browser copied a tab. */
  readonly streams: Set<ServerResponse>;
  /** What came while no stream was open, as during a reload. */
  readonly unsent: Uint8Array[];
}

/** A tab that reads nothing for this long a stretch of bytes is cut off rather than kept in memory. */
const mostUnread_bytes = 256 * 1024 * 1024;
const mostUnsent = 64;

/**
 * Who may come in. A code opens one tab, once; the tab gets a secret of its own for it. Codes and secrets are 256 random
 * bits, so looking one up by its value gives nothing away.
 */
export class Tabs {
  readonly #codes = new Map<string, () => void>();
  readonly #tabs = new Map<string, Tab>();
  readonly #wrongCodes = new Allowance({ atOnce: 20, perSecond: 0.2 });
  #onLastClosed: () => void = () => undefined;

  /** Calls back when the code is used. */
  newCode(onUse: () => void): string {
    const code = random();
    this.#codes.set(code, onUse);
    return code;
  }

  /** The new tab's secret; 'wrong' for a code that is not open any more or never was, 'too many' after many of those. */
  enter(code: string): { readonly secret: string } | 'wrong' | 'too many' {
    const onUse = this.#codes.get(code);
    if (!onUse) return this.#wrongCodes.take() ? 'wrong' : 'too many';
    this.#codes.delete(code);
    onUse();
    const secret = random();
    this.#tabs.set(secret, {
      requests: new Allowance({ atOnce: 300, perSecond: 100 }),
      streams: new Set(),
      unsent: [],
    });
    return { secret };
  }

  /** The tab that an Authorization header belongs to. */
  find(authorization: string | undefined): Tab | null {
    return this.#tabs.get(authorization?.replace(/^Bearer /, '') ?? '') ?? null;
  }

  /** Calls back whenever the last open stream closes. */
  onLastClosed(listener: () => void): void {
    this.#onLastClosed = listener;
  }

  get anyOpen(): boolean {
    return [...this.#tabs.values()].some((tab) => tab.streams.size > 0);
  }

  /** Opens a tab's stream and sends what waited for it. */
  listen(tab: Tab, stream: ServerResponse): void {
    tab.streams.add(stream);
    stream.once('close', () => {
      tab.streams.delete(stream);
      if (!this.anyOpen) this.#onLastClosed();
    });
    for (const message of tab.unsent.splice(0)) write(stream, message);
  }

  send(tab: Tab, message: Uint8Array): void {
    if (tab.streams.size === 0) {
      tab.unsent.push(message);
      if (tab.unsent.length > mostUnsent) tab.unsent.shift();
    }
    for (const stream of tab.streams) write(stream, message);
  }

  /** To every open stream: for news that only matters to those who look now. */
  sendAll(message: Uint8Array): void {
    for (const tab of this.#tabs.values()) for (const stream of tab.streams) write(stream, message);
  }
}

/** Length first, as uint32, so that the reader can tell messages apart. */
function write(stream: ServerResponse, message: Uint8Array): void {
  if (stream.writableLength > mostUnread_bytes) {
    stream.destroy();
    return;
  }
  const length = new Uint8Array(4);
  new DataView(length.buffer).setUint32(0, message.length, true);
  stream.write(length);
  if (message.length > 0) stream.write(message);
}

const random = (): string => randomBytes(32).toString('base64url');
