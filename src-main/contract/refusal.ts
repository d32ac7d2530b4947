// The expected "no": plain data, because a process boundary keeps only the message of a thrown error.

export const refusalCodes = [
  'quantity-out-of-range',
  'unit-unknown',
  'text-not-a-quantity',
  'document-unknown-field',
  'document-field-missing',
  'document-wrong-type',
  'document-not-json',
  'document-newer-than-app',
  'document-wrong-kind',
  'name-unknown',
  'name-twice',
  'site-off-the-cell',
  'couplings-form-a-loop',
  'couplings-leave-parts',
  'protocol-empty',
  'too-large',
  'window-outside-sweep',
  'swc-refused',
  'file-not-found',
  'file-exists',
  'file-not-a-notebook',
  'file-outside-folder',
  'file-unreadable',
  'file-unwritable',
  'notebook-newer-than-app',
  'notebook-read-only',
  'notebook-record-missing',
  'request-malformed',
  'run-diverged',
  'not-measurable',
  'worker-stopped',
  'engine-stopped',
  'job-cancelled',
] as const;

export type RefusalCode = (typeof refusalCodes)[number];

export interface RefusalData {
  readonly code: RefusalCode;
  /** In the user's words: "axial resistivity". */
  readonly thing: string;
  /** Where: "cell.makeUp.apical", "dendrite.swc line 12", or "sweep 3, t = 12.4 ms, compartment 118". */
  readonly place: string;
  /** As given, with its unit: "-150 Ω·cm". */
  readonly value: string;
  /** One thing to do next: "give a finite value above 0". */
  readonly remedy: string;
}
