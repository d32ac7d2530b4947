// What the browser shell's server lets in, asked by a plain HTTP client that can forge any header.
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { decodeFrame, encodeText } from '../../src-main/contract/frame.ts';
import { Allowance } from '../../src-main/shells/browser/allowance.ts';
import { serve, type Served } from '../../src-main/shells/browser/server.ts';
import { EngineClient, type EngineProcess } from '../../src-main/shells/engine-client.ts';

interface Reply {
  status: number;
  headers: Record<string, unknown>;
  body: Buffer;
}

let folder: string;
let served: Served;
let asked: string[];

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-door-'));
  writeFileSync(join(folder, 'index.html'), '<!doctype html>');
  writeFileSync(join(folder, 'private.key'), 'private');
  asked = [];
  const engine = (): EngineProcess => {
    let say: Parameters<EngineProcess['onMessage']>[0] = () => undefined;
    return {
      send: ({ call, name }) => {
        asked.push(name);
        say({ kind: 'answer', call, answer: { ok: true, value: name } });
      },
      onMessage: (listener) => void (say = listener),
      onExit: () => undefined,
      stop: () => undefined,
    };
  };
  served = await serve({ pages: folder, client: new EngineClient(engine, '/a.holdfast'), startFolder: folder });
});
afterAll(async () => {
  await served.close();
  rmSync(folder, { recursive: true });
});

function send(method: string, path: string, headers: Record<string, string> = {}, body = ''): Promise<Reply> {
  const { port } = new URL(served.address);
  return new Promise((resolve, reject) => {
    const sent = request({ host: '127.0.0.1', port, method, path, headers }, (response) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.on('end', () =>
        resolve({ status: response.statusCode ?? 0, headers: response.headers, body: Buffer.concat(parts) }),
      );
    });
    sent.on('error', reject);
    sent.end(body);
  });
}

const own = () => ({ Origin: served.address.slice(0, -1), 'Content-Type': 'application/json' });
const code = () => new URL(served.newAddress()).hash.slice(1);
const content = (reply: Reply): unknown => decodeFrame(new Uint8Array(reply.body).buffer);
async function letIn(): Promise<Record<string, string>> {
  const reply = await send('POST', '/enter', own(), encodeText({ code: code() }));
  return { ...own(), Authorization: `Bearer ${(content(reply) as { secret: string }).secret}` };
}
const about = encodeText({ call: '1', name: 'engine about', question: {} });

describe("the browser shell's door", () => {
  it('answers on the loopback address only', () => {
    expect(served.address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
  });

  it('lets in a tab with a code, once', async () => {
    const once = code();
    expect((await send('POST', '/enter', own(), encodeText({ code: once }))).status).toBe(200);
    expect((await send('POST', '/enter', own(), encodeText({ code: once }))).status).toBe(401);
    expect((await send('POST', '/enter', own(), encodeText({ code: '' }))).status).toBe(401);
  });

  it('gives every tab a secret of its own', async () => {
    expect((await letIn())['Authorization']).not.toBe((await letIn())['Authorization']);
  });

  it('passes on the questions of a tab that was let in', async () => {
    const reply = await send('POST', '/ask', await letIn(), about);
    expect(content(reply)).toEqual({ ok: true, value: 'engine about' });
  });

  it.each<[string, number, Record<string, string | null>]>([
    ['no secret', 401, { Authorization: null }],
    ['a wrong secret', 401, { Authorization: 'Bearer x' }],
    ['an empty secret', 401, { Authorization: 'Bearer ' }],
    ['another host name', 403, { Host: 'holdfast.example' }],
    ['another site as origin', 403, { Origin: 'http://holdfast.example' }],
    ['an opaque origin', 403, { Origin: 'null' }],
    ['no origin', 403, { Origin: null }],
    ['a form', 415, { 'Content-Type': 'application/x-www-form-urlencoded' }],
    ['plain text', 415, { 'Content-Type': 'text/plain' }],
  ])('turns away a question with %s', async (_what, status, change) => {
    const before = asked.length;
    const headers = Object.entries({ ...(await letIn()), ...change }).filter(([, value]) => value !== null);
    const reply = await send('POST', '/ask', Object.fromEntries(headers) as Record<string, string>, about);
    expect([reply.status, asked.length]).toEqual([status, before]);
  });

  it.each([
    ['GET', '/', 200],
    ['GET', '/private.key', 404],
    ['GET', '/../index.html', 200], // resolved by the URL parser to /index.html
    ['GET', '/..%2f..%2fetc%2fpasswd.html', 404],
    ['GET', '/%', 404],
    ['PUT', '/', 405],
    ['POST', '/nowhere', 401],
  ])(
    'answers %s %s with %i, always under the strict policy and never for other origins',
    async (method, path, status) => {
      const reply = await send(method, path, method === 'POST' ? own() : {});
      expect(reply.status).toBe(status);
      expect(reply.headers['content-security-policy']).toContain("default-src 'none'");
      expect(reply.headers['x-content-type-options']).toBe('nosniff');
      expect(reply.headers['cross-origin-resource-policy']).toBe('same-origin');
      expect(reply.headers).not.toHaveProperty('access-control-allow-origin');
    },
  );

  it('refuses a question that is too large without asking the engine', async () => {
    const before = asked.length;
    const reply = await send('POST', '/ask', await letIn(), ' '.repeat(64 * 1024 * 1024 + 1));
    expect(content(reply)).toMatchObject({ ok: false, refusals: [{ code: 'too-large' }] });
    expect(asked).toHaveLength(before);
  });

  it('survives a question that is no JSON', async () => {
    const headers = await letIn();
    await expect(send('POST', '/ask', headers, '{')).rejects.toThrow();
    expect((await send('POST', '/ask', headers, about)).status).toBe(200);
  });

  it('slows down a tab that asks too fast, and only that one', async () => {
    const [fast, other] = [await letIn(), await letIn()];
    const statuses = new Set<number>();
    for (let turn = 0; turn < 2000 && !statuses.has(429); turn++) {
      for (const reply of await Promise.all(Array.from({ length: 50 }, () => send('POST', '/ask', fast, about)))) {
        statuses.add(reply.status);
      }
    }
    expect(statuses).toContain(429);
    expect((await send('POST', '/ask', other, about)).status).toBe(200);
  });

  // Last: it shuts the door to codes for a while.
  it('stops listening to codes after many wrong ones', async () => {
    const replies = [];
    for (let turn = 0; turn < 40; turn++)
      replies.push((await send('POST', '/enter', own(), encodeText({ code: 'x' }))).status);
    expect(replies.at(-1)).toBe(429);
    expect((await send('POST', '/enter', own(), encodeText({ code: code() }))).status).toBe(200);
  });
});

describe('an allowance', () => {
  it('gives so many at once and so many more with time, never more than it holds', () => {
    const clock = { now: 0 };
    const allowance = new Allowance({ atOnce: 2, perSecond: 1 }, () => clock.now);
    const take = () => allowance.take();
    expect([take(), take(), take()]).toEqual([true, true, false]);
    clock.now = 1000;
    expect([take(), take()]).toEqual([true, false]);
    clock.now = 100_000;
    expect([take(), take(), take()]).toEqual([true, true, false]);
  });
});
