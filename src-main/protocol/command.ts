/** A piece of a command: linear from v0 to v1 over [start, end), SI (V or A). Pieces abut; a jump is two pieces. */
export interface CommandPiece {
  readonly start: number;
  readonly end: number;
  readonly v0: number;
  readonly v1: number;
}
