import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

/** Debian's Chromium. Maps are drawn by WebGL in software; pages are put together without it, which costs a third less. */
const PROGRAM = '/usr/bin/chromium';
const SWITCHES = [
  '--no-sandbox',
  '--disable-gpu',
  '--enable-unsafe-swiftshader',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
/** Not in the repository: pictures of what a failing test saw. */
const PICTURES = path.resolve(import.meta.dirname, '../../dist/e2e');

export interface Viewport {
  readonly width: number;
  readonly height: number;
}

export interface WatchedPage {
  readonly context: BrowserContext;
  readonly page: Page;
  /** Lets go of faults that the test brings about on purpose, and says how many there were. */
  forgive(pattern: RegExp): number;
  /** @returns what the browser complained about and nobody forgave */
  faults(): readonly string[];
  picture(name: string): Promise<void>;
  /** Closes; throws when the browser complained about anything. */
  close(): Promise<void>;
}

export function launchBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: PROGRAM, args: SWITCHES });
}

/**
 * A page that nothing escapes: every console error or warning, uncaught error, failed request and request to another origin is
 * kept as a fault, and closing it throws if there is one.
 */
export async function watchedPage(
  browser: Browser,
  options: { origin: string; viewport: Viewport; timeZone?: string },
): Promise<WatchedPage> {
  const context = await browser.newContext({
    baseURL: options.origin,
    viewport: options.viewport,
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: options.timeZone ?? 'Pacific/Chatham',
  });
  let faults: string[] = [];
  context.on('console', (message) => {
    if (['error', 'warning'].includes(message.type()) && !isDriverNote(message.text())) {
      faults.push(`console ${message.type()}: ${message.text()} (${message.location().url})`);
    }
  });
  context.on('weberror', (error) => faults.push(`uncaught: ${error.error().stack ?? error.error().message}`));
  context.on('request', (request) => {
    if (!isOwn(request.url(), options.origin)) faults.push(`request to another origin: ${request.url()}`);
  });
  context.on('requestfailed', (request) => {
    const reason = request.failure()?.errorText ?? 'no reason';
    // A page that is left cancels what it still waits for, such as its event stream.
    if (reason !== 'net::ERR_ABORTED') faults.push(`failed: ${request.method()} ${request.url()}: ${reason}`);
  });
  const page = await context.newPage();
  page.setDefaultTimeout(45_000);

  return {
    context,
    page,
    forgive(pattern) {
      const before = faults.length;
      faults = faults.filter((fault) => !pattern.test(fault));
      return before - faults.length;
    },
    faults: () => faults,
    async picture(name) {
      mkdirSync(PICTURES, { recursive: true });
      await page.screenshot({ path: path.join(PICTURES, `${name}.png`) });
    },
    async close() {
      await context.close();
      if (faults.length > 0) throw new Error(`the browser complained:\n${faults.join('\n')}`);
    },
  };
}

function isOwn(url: string, origin: string): boolean {
  const { protocol, origin: found } = new URL(url);
  return protocol === 'data:' || protocol === 'blob:' || protocol === 'about:' || found === origin;
}

/** Chromium's own remark on reading pixels back from software WebGL: nothing that a page could mend. */
function isDriverNote(text: string): boolean {
  return /GL Driver Message .*GPU stall due to ReadPixels/.test(text);
}
