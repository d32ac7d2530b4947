import type { RefusalData } from '../contract/refusal.ts';
import type { WorkName } from './work.ts';

export interface ToWorker {
  readonly piece: number;
  readonly name: WorkName;
  readonly question: unknown;
  readonly cancel: Int32Array<SharedArrayBuffer> | null;
}

export type FromWorker =
  | { readonly piece: number; readonly kind: 'progress'; readonly done: number }
  | { readonly piece: number; readonly kind: 'part'; readonly part: unknown }
  | { readonly piece: number; readonly kind: 'done'; readonly answer: unknown }
  | { readonly piece: number; readonly kind: 'refused'; readonly refusals: readonly [RefusalData, ...RefusalData[]] }
  | { readonly piece: number; readonly kind: 'failed'; readonly stack: string };
