/** What a planner waits for in a browser that draws in software: by the clock, with the processor time of its processes beside it. */
import type { Browser, BrowserContext, CDPSession, Page } from 'playwright-core';
import { STATIONS_DRAWN } from '../../src/map/use-idle-mark.ts';
import { launchBrowser } from '../support/browser.ts';

const ROUNDS = 5;
const PATIENCE_MS = 120_000;
const SLIDES = 3;

export interface ScreenAsked {
  readonly origin: string;
  readonly email: string;
  readonly password: string;
  readonly print: (line: string) => void;
}

export async function measureScreen(asked: ScreenAsked): Promise<void> {
  const browser = await launchBrowser();
  try {
    const context = await signedIn(browser, asked);
    await measureDrawing(browser, { ...asked, context });
    await measureSlides(context, asked);
  } finally {
    await browser.close();
  }
}

async function signedIn(browser: Browser, { origin, email, password }: ScreenAsked): Promise<BrowserContext> {
  const context = await browser.newContext({ baseURL: origin, viewport: { width: 1440, height: 900 } });
  const page = await context.newPage();
  await page.goto('/');
  await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await isIdle(page);
  await page.close();
  return context;
}

async function measureDrawing(
  browser: Browser,
  { context, origin, print }: ScreenAsked & { context: BrowserContext },
): Promise<void> {
  const session = await browser.newBrowserCDPSession();
  const drawn: number[] = [];
  const idle: number[] = [];
  const renderer: number[] = [];
  const graphics: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const page = await context.newPage();
    const before = await processorOf(session);
    await page.goto(origin);
    await isIdle(page);
    // From the start of the navigation, code and data included.
    const times = await page.evaluate(
      (name) => [performance.getEntriesByName(name)[0]?.startTime ?? Number.NaN, performance.now()],
      STATIONS_DRAWN,
    );
    const after = await processorOf(session);
    drawn.push(times[0] ?? Number.NaN);
    idle.push(times[1] ?? Number.NaN);
    renderer.push(after.renderer - before.renderer);
    graphics.push(after.graphics - before.graphics);
    await page.close();
  }
  print(
    `stations drawn: ${middle(drawn)} ms, idle: ${middle(idle)} ms after the navigation began; processor until idle: ${middle(renderer)} ms of the page, ${middle(graphics)} ms of software graphics`,
  );
}

/** Each step of a slider until the map stands under its draft. */
async function measureSlides(context: BrowserContext, { origin, print }: ScreenAsked): Promise<void> {
  const page = await context.newPage();
  await page.goto(origin);
  await isIdle(page);
  const session = await context.newCDPSession(page);
  // The thread's own time: on a shared machine the clock says how busy the others are.
  await session.send('Performance.enable', { timeDomain: 'threadTicks' });
  const thumb = page.getByRole('slider', { name: 'Direct effectiveness' });
  await thumb.focus();
  const first: number[] = [];
  const firstClock: number[] = [];
  const work: number[] = [];
  const clock: number[] = [];
  for (let slide = 0; slide <= SLIDES; slide++) {
    const before = await mainThreadMs(session);
    const begun = performance.now();
    const recoloured = countsChange(page);
    await page.keyboard.press('ArrowLeft');
    await recoloured;
    const atFirst = (await mainThreadMs(session)) - before;
    const firstMs = performance.now() - begun;
    await page.getByRole('region', { name: 'Draft' }).waitFor();
    await page.locator('[aria-busy="true"]').first().waitFor({ state: 'detached', timeout: PATIENCE_MS });
    await isIdle(page);
    const spent = (await mainThreadMs(session)) - before;
    // The first one judges every year anew and fetches what the sliders are made of.
    if (slide === 0) continue;
    first.push(atFirst);
    firstClock.push(firstMs);
    work.push(spent);
    clock.push(performance.now() - begun);
  }
  print(
    `a slide until the map shows it: ${middle(first)} ms of the main thread, ${middle(firstClock)} ms by the clock (the first 2,000 stations and sites of those in view)`,
  );
  print(
    `a slide until all is recoloured and at rest: ${middle(work)} ms of the main thread, ${middle(clock)} ms by the clock`,
  );
  await page.close();
}

/** Answers when the counts of the legend have changed and a frame with the marks of that moment has been drawn. */
async function countsChange(page: Page): Promise<void> {
  await page.evaluate(() => {
    const list = document.querySelector('[aria-label="Legend"] ul, [aria-label="Legend"] ol');
    const drawn = new Promise<void>((resolve) => {
      const observer = new MutationObserver(() => {
        observer.disconnect();
        requestAnimationFrame(() => requestAnimationFrame(() => resolve()));
      });
      if (list !== null) observer.observe(list, { characterData: true, childList: true, subtree: true });
    });
    Object.assign(window, { recoloured: drawn });
  });
  await page.evaluate(() => (window as unknown as { recoloured: Promise<void> }).recoloured);
}

async function isIdle(page: Page): Promise<void> {
  await page.locator('[data-sheet-map][data-idle]').waitFor({ state: 'attached', timeout: PATIENCE_MS });
}

/** Processor time of the browser's processes, ms. */
async function processorOf(session: CDPSession): Promise<{ renderer: number; graphics: number }> {
  const { processInfo } = await session.send('SystemInfo.getProcessInfo');
  const sum = (kind: string) =>
    processInfo.filter(({ type }) => type === kind).reduce((total, { cpuTime }) => total + 1000 * cpuTime, 0);
  return { renderer: sum('renderer'), graphics: sum('GPU') };
}

/** Processor time of the page's main thread, ms. */
async function mainThreadMs(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics');
  return 1000 * (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? 0);
}

function middle(values: readonly number[]): string {
  return (values.toSorted((one, other) => one - other)[Math.floor(values.length / 2)] ?? Number.NaN).toFixed(0);
}
