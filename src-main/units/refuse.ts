import type { RefusalCode, RefusalData } from '../contract/refusal.ts';

/** An expected "no": the input or the world is at fault. A bug in our own code throws a plain Error instead. */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  readonly data: RefusalData;
  /** Every fault found, the first included; one when only one was looked for. */
  readonly all: readonly RefusalData[];

  constructor(data: RefusalData | readonly [RefusalData, ...RefusalData[]], options?: { cause?: unknown }) {
    const all: readonly [RefusalData, ...RefusalData[]] = isList(data) ? data : [data];
    super(all.map(wording).join('\n'), options);
    this.data = all[0];
    this.all = all;
  }
}

function isList(
  data: RefusalData | readonly [RefusalData, ...RefusalData[]],
): data is readonly [RefusalData, ...RefusalData[]] {
  return Array.isArray(data);
}

/** The sentence a refusal reads as on a terminal. */
export function wording(data: RefusalData): string {
  return `${data.thing} at ${data.place} is ${data.value}: ${data.remedy}`;
}

/** Throws a Refusal made of its four parts. */
export function refuse(code: RefusalCode, parts: Omit<RefusalData, 'code'>): never {
  throw new Refusal({ code, ...parts });
}
