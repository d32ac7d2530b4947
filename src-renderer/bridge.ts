// The only place that touches window.holdfast or fetch.
import type { Bridge, FolderListing } from '../src-main/contract/bridge.ts';
import { decodeFrame, encodePieces, encodeText } from '../src-main/contract/frame.ts';
import type { RefusalCode } from '../src-main/contract/refusal.ts';
import type { Answer, EngineEvent } from '../src-main/contract/requests.ts';
import { mostRequest_bytes } from './state/file-limits.ts';

type Streamed =
  | { readonly kind: 'answer'; readonly call: string; readonly answer: Answer }
  | { readonly kind: 'event'; readonly event: EngineEvent };

const secretKey = 'holdfast-secret';
const retry_ms = 1000;
/** A browser lets as much outlive its page. */
const mostLast_bytes = 60_000;
/** Tries to reach the server again, after which it counts as gone. */
const mostRetries = 5;

function browserBridge(): Bridge {
  const listeners = new Set<(event: EngineEvent) => void>();
  const waiting = new Map<string, (answer: Answer) => void>();
  const secret = enter();
  void secret.then((given) => listen(given));

  let isLeaving = false;
  window.addEventListener('pagehide', () => (isLeaving = true), { capture: true });
  window.addEventListener('pageshow', () => (isLeaving = false));

  async function post(path: string, content: unknown): Promise<Response> {
    return postBody(path, new Blob([encodeText(content)]));
  }

  async function postBody(path: string, body: Blob): Promise<Response> {
    const headers = { Authorization: `Bearer ${await secret}`, 'Content-Type': 'application/json' };
    // What is saved while the page goes away must outlive it.
    return fetch(path, { method: 'POST', headers, body, keepalive: isLeaving && body.size < mostLast_bytes });
  }

  async function ask(name: string, question: unknown): Promise<Answer> {
    const call = crypto.randomUUID();
    // Waits from the start: a late answer may overtake the word that it will be late.
    const late = new Promise<Answer>((resolve) => waiting.set(call, resolve));
    try {
      const asked = { call, name, question };
      // A file is encoded piece by piece, so that the page goes on meanwhile; the rest is short.
      const body = new Blob(holdsFile(question) ? await encodePieces(asked, nextTurn) : [encodeText(asked)]);
      if (body.size > mostRequest_bytes) return overLimit(body.size);
      const response = await postBody('/ask', body);
      if (response.status === 202) return await late;
      return response.ok ? ((await framed(response)) as Answer) : turnedAway(response.status);
    } catch {
      return gone();
    } finally {
      waiting.delete(call);
    }
  }

  /** Reads engine events and late answers for as long as the page lives. */
  async function listen(given: string): Promise<void> {
    for (let failures = 0; given && failures < mostRetries; failures++) {
      try {
        const response = await post('/stream', {});
        if (!response.ok || !response.body) break;
        failures = 0;
        for await (const message of messages(response.body)) {
          if (message.kind === 'event') for (const listener of listeners) listener(message.event);
          else waiting.get(message.call)?.(message.answer);
        }
      } catch {
        // Cut off: the server has gone, or the computer slept.
      }
      await new Promise((resolve) => setTimeout(resolve, retry_ms));
    }
    for (const settle of waiting.values()) settle(gone());
  }

  return {
    shell: 'browser',
    ask: (name, question) => ask(name, question) as ReturnType<Bridge['ask']> as never,
    onEvent: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    // A browser keeps its own menu.
    onCommand: () => () => undefined,
    chooseNotebook: () => Promise.resolve(null),
    async listFolder(folder) {
      try {
        const response = await post('/folder', { folder });
        return response.ok ? ((await framed(response)) as Answer<FolderListing>) : turnedAway(response.status);
      } catch {
        return gone();
      }
    },
  };
}

/** Exchanges the one-time code of the address for this tab's secret; a reload finds that in the tab's memory. */
async function enter(): Promise<string> {
  const code = location.hash.slice(1);
  if (code) {
    history.replaceState(null, '', location.pathname);
    const headers = { 'Content-Type': 'application/json' };
    const response = await fetch('/enter', { method: 'POST', headers, body: encodeText({ code }) }).catch(() => null);
    if (response?.ok) sessionStorage.setItem(secretKey, ((await framed(response)) as { secret: string }).secret);
  }
  return sessionStorage.getItem(secretKey) ?? '';
}

const framed = async (response: Response): Promise<unknown> => decodeFrame(await response.arrayBuffer());

/** A stream cut into messages: each its length as uint32, then a frame. An empty one is a sign of life. */
async function* messages(body: ReadableStream<Uint8Array>): AsyncGenerator<Streamed> {
  const reader = body.getReader();
  const parts: Uint8Array[] = [];
  let held = 0;
  let wanted: number | null = null;
  for (;;) {
    while (held >= (wanted ?? 4)) {
      const whole = joined(parts);
      const bytes = whole.slice(0, wanted ?? 4);
      parts.splice(0, parts.length, whole.subarray(bytes.length));
      held -= bytes.length;
      if (wanted === null) {
        wanted = new DataView(bytes.buffer).getUint32(0, true);
      } else {
        if (wanted > 0) yield decodeFrame(bytes.buffer) as Streamed;
        wanted = null;
      }
    }
    const { done, value } = await reader.read();
    if (done) return;
    parts.push(value);
    held += value.length;
  }
}

function joined(parts: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(parts.reduce((size, part) => size + part.length, 0));
  let end = 0;
  for (const part of parts) {
    whole.set(part, end);
    end += part.length;
  }
  return whole;
}

const nextTurn = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

function holdsFile(question: unknown): boolean {
  if (typeof question !== 'object' || question === null) return false;
  return Object.values(question).some((field) => field instanceof Uint8Array);
}

function overLimit(size: number): Answer<never> {
  const value = `${Math.ceil(size / 1e6)} MB`;
  const most = `${Math.floor(mostRequest_bytes / 1e6)} MB`;
  const remedy = `a browser tab sends at most ${most} at once: work on this cell in the desktop window`;
  const refusal = { code: 'too-large', thing: 'what is to be sent', place: 'this tab', value, remedy } as const;
  return { ok: false, refusals: [refusal] };
}

function gone(): Answer<never> {
  return refused('engine-stopped', 'not running', 'start Holdfast again; what was saved is in the notebook');
}

function turnedAway(status: number): Answer<never> {
  if (status === 429) return refused('too-large', 'too many at once', 'wait a second and try again');
  return refused('request-malformed', 'not let in', 'open the address that the terminal shows, which works once');
}

function refused(code: RefusalCode, value: string, remedy: string): Answer<never> {
  return { ok: false, refusals: [{ code, thing: 'Holdfast', place: 'this tab', value, remedy }] };
}

/**
 * Electron's preload puts a bridge into the window; in a browser there is none, and the page makes its own.
 * Last in the file, because making it uses the constants above.
 */
export const bridge: Bridge = (window as { holdfast?: Bridge }).holdfast ?? browserBridge();
