import type { IncomingMessage } from 'node:http';

/** Long: an SWC file of a densely traced cell, in base64, several times over. */
const most_bytes = { short: 16 * 1024, long: 64 * 1024 * 1024 } as const;

/** A request's body as text; null when it is larger than allowed. The rest is then left unread. */
export async function readBody(request: IncomingMessage, kind: keyof typeof most_bytes): Promise<string | null> {
  const parts: Buffer[] = [];
  let size = 0;
  for await (const part of request as AsyncIterable<Buffer>) {
    size += part.length;
    if (size > most_bytes[kind]) return null;
    parts.push(part);
  }
  return Buffer.concat(parts).toString('utf8');
}
