import { resolve } from 'node:path';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Call, EngineEvent, EngineMessage } from '../../src-main/contract/requests.ts';
import { EngineClient, type EngineProcess } from '../../src-main/shells/engine-client.ts';
import { startWithNode } from '../../src-main/shells/start-with-node.ts';

/** An engine that does nothing by itself; the test plays its part. */
class PlayedEngine implements EngineProcess {
  readonly notebookPath: string;
  readonly calls: Call[] = [];
  say: (message: EngineMessage) => void = () => undefined;
  readonly #mourners: ((how: string) => void)[] = [];
  wasStopped = false;

  constructor(notebookPath: string) {
    this.notebookPath = notebookPath;
  }
  send(call: Call): void {
    this.calls.push(call);
  }
  onMessage(listener: (message: EngineMessage) => void): void {
    this.say = listener;
  }
  onExit(listener: (how: string) => void): void {
    this.#mourners.push(listener);
  }
  die(how: string): void {
    for (const mourner of this.#mourners.splice(0)) mourner(how);
  }
  stop(): void {
    this.wasStopped = true;
  }
  answer(value: unknown, call = this.calls.at(-1)?.call ?? 0): void {
    this.say({ kind: 'answer', call, answer: { ok: true, value } });
  }
}

function played() {
  const engines: PlayedEngine[] = [];
  const events: EngineEvent[] = [];
  const clock = { now: 0 };
  const start = (notebookPath: string) => {
    const engine = new PlayedEngine(notebookPath);
    engines.push(engine);
    return engine;
  };
  const client = new EngineClient(start, '/a.holdfast', () => clock.now);
  client.onEvent((event) => events.push(event));
  const last = (): PlayedEngine => engines.at(-1) as PlayedEngine;
  return { client, engines, events, clock, last };
}

const stopped = { ok: false, refusals: [expect.objectContaining({ code: 'engine-stopped' })] };

describe('the line to the engine', () => {
  it('gives each call its own answer, in whatever order they come', async () => {
    const { client, last } = played();
    const first = client.relay('plan open', { planId: 1 });
    const second = client.relay('plan open', { planId: 2 });
    last().answer('two', 2);
    last().answer('one', 1);
    expect(await Promise.all([first, second])).toEqual([
      { ok: true, value: 'one' },
      { ok: true, value: 'two' },
    ]);
  });

  it('answers calls in flight with a refusal when the engine dies, and starts another', async () => {
    const { client, engines, events, last } = played();
    const asked = client.relay('rehearsal start', {});
    last().die('exit code 1');
    expect(await asked).toEqual(stopped);
    expect(engines).toHaveLength(2);
    expect(events).toEqual([{ event: 'engine restarted', reason: expect.stringContaining('exit code 1') as string }]);
    const again = client.relay('plan open', {});
    last().answer('back');
    expect(await again).toEqual({ ok: true, value: 'back' });
  });

  it('starts the engine again on the notebook that was open last', async () => {
    const { client, last } = played();
    const opened = client.ask('notebook open', { path: 'b' });
    last().answer({ path: '/real/b.holdfast' });
    await opened;
    const refused = client.ask('notebook open', { path: 'c' });
    last().say({ kind: 'answer', call: 2, answer: { ok: false, fault: 'no' } });
    await refused;
    last().die('exit code 1');
    expect(last().notebookPath).toBe('/real/b.holdfast');
  });

  it('gives up after three restarts within a minute, and tries again a minute later', async () => {
    const { client, engines, clock, last } = played();
    for (let death = 0; death < 4; death++) last().die('exit code 1');
    expect(engines).toHaveLength(4);
    expect(await client.relay('plan open', {})).toEqual(stopped);
    clock.now = 60_001;
    const asked = client.relay('plan open', {});
    expect(engines).toHaveLength(5);
    last().answer('back');
    expect(await asked).toEqual({ ok: true, value: 'back' });
  });

  it('does not start again what was stopped on purpose', async () => {
    const { client, engines, events, last } = played();
    const asked = client.relay('plan open', {});
    const end = client.stop();
    last().die('SIGTERM');
    await end;
    expect(await asked).toEqual(stopped);
    expect(await client.relay('plan open', {})).toEqual(stopped);
    expect([engines.length, last().wasStopped, events]).toEqual([1, true, []]);
  });

  it('settles its end only when the engine has gone', async () => {
    const { client, last } = played();
    let hasEnded = false;
    const end = client.stop().then(() => (hasEnded = true));
    await Promise.resolve();
    expect([last().wasStopped, hasEnded]).toEqual([true, false]);
    last().die('SIGTERM');
    await end;
  });

  it('is quiet when nothing is in flight, or time is up', async () => {
    const { client, clock, last } = played();
    await client.quiet(1000);
    void client.relay('never', {});
    const quiet = client.quiet(1000);
    clock.now = 1000;
    await quiet;
    expect(last().calls).toHaveLength(1);
  });
});

describe('an engine under Node', () => {
  let client: EngineClient;
  afterEach(() => client.stop());
  const open = (file = 'tests/support/stand-in-engine.cjs') =>
    (client = new EngineClient(startWithNode(resolve(file)), '/a.holdfast'));

  it('carries typed arrays, NaN and dates both ways', async () => {
    const value = { trace: Float64Array.of(1, NaN), reach: NaN, bytes: Uint8Array.of(255), when: new Date(0) };
    expect(await open().relay('echo', value)).toEqual({ ok: true, value });
  });

  it('is started again when it dies in the middle of a call', async () => {
    open();
    const events: EngineEvent[] = [];
    client.onEvent((event) => events.push(event));
    const never = client.relay('never', {});
    expect(await client.relay('die', {})).toEqual(stopped);
    expect(await never).toEqual(stopped);
    expect(await client.relay('which notebook', {})).toEqual({ ok: true, value: '/a.holdfast' });
    expect(events).toEqual([{ event: 'engine restarted', reason: expect.stringContaining('exit code 3') as string }]);
  });

  it('whose file does not exist is refused, not waited for', async () => {
    const complaints = vi.spyOn(console, 'error').mockImplementation(() => undefined);
    expect(await open('tests/support/no-such-engine.mjs').relay('echo', {})).toEqual(stopped);
    complaints.mockRestore();
  });
});
