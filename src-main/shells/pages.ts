// The built page as files to serve, with the headers that both shells send.
import { readFile } from 'node:fs/promises';
import { extname, join, normalize, sep } from 'node:path';

const types: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.woff2': 'font/woff2',
  '.woff': 'font/woff',
};

const contentSecurityPolicy = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "img-src 'self' data: blob:",
  "font-src 'self'",
  "connect-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
  "require-trusted-types-for 'script'",
  // Svelte's own policy for the templates it compiled.
  'trusted-types svelte-trusted-html',
].join('; ');

/** On every response of both shells. */
export const pageHeaders: Readonly<Record<string, string>> = {
  'Content-Security-Policy': contentSecurityPolicy,
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Embedder-Policy': 'require-corp',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'X-Content-Type-Options': 'nosniff',
  'Referrer-Policy': 'no-referrer',
  'Cache-Control': 'no-store',
};

export interface Page {
  readonly status: 200 | 404;
  readonly headers: Readonly<Record<string, string>>;
  readonly body: Uint8Array<ArrayBuffer>;
}

/** The file at a URL path below the folder; 404 for everything else, types it does not know included. */
export async function readPage(folder: string, urlPath: string): Promise<Page> {
  try {
    const relative = normalize(decodeURIComponent(urlPath === '/' ? '/index.html' : urlPath));
    const type = types[extname(relative)];
    if (!type || relative.split(sep).includes('..')) return notFound();
    const body = new Uint8Array(await readFile(join(folder, relative)));
    return { status: 200, headers: { ...pageHeaders, 'Content-Type': type }, body };
  } catch {
    // Unreadable, or not a path at all: to the browser both are "not here".
    return notFound();
  }
}

function notFound(): Page {
  const body = new TextEncoder().encode('Not found');
  return { status: 404, headers: { ...pageHeaders, 'Content-Type': 'text/plain' }, body };
}
