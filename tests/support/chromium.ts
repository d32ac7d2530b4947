import { chromium, type Browser, type Page } from 'playwright-core';
import { findBrowser } from '../../src-main/shells/browser/find-browser.ts';

/** A headless browser for tests. Its own sandbox is off, because test machines run as root; the product leaves it on. */
export function launchChromium(): Promise<Browser> {
  const executablePath = findBrowser();
  if (!executablePath) throw new Error('no Chromium: install one, or let CHROMIUM name one');
  return chromium.launch({ executablePath, chromiumSandbox: false, args: ['--disable-gpu', '--disable-quic'] });
}

// Svelte's advice that a part on its way out was asked once more for a derived value: nothing of it reaches the screen.
const advice = /svelte\.dev\/e\/derived_inert/;

/** Collects what a page says on its console, refusals by the content security policy included. */
export function complaintsOf(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (!advice.test(message.text())) complaints.push(`${message.type()}: ${message.text()}`);
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  return complaints;
}
