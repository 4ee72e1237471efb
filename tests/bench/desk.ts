import { readFileSync, mkdirSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { type Browser, type Page, chromium } from '@playwright/test';
import { serveDemo } from '../../docker-free-fakes/test-parts.mjs';
import { addExcerptOf, labels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';
import { quartetXml } from '../support/quartet';

/**
 * The desk in Chromium against the production build; every figure is a ratio or a share of one run. With BASE_URL a server
 * that runs already is measured; it must hold the demo.
 */
const TURNS = 7;
const EDITS = 40;
const BARS = 300;
const ROOT = path.resolve(import.meta.dirname, '../..');
const WINDOW = { width: 1366, height: 768 };

export async function run(): Promise<void> {
  const ends: (() => unknown)[] = [];
  const workDir = path.join(ROOT, '.data/bench');
  mkdirSync(workDir, { recursive: true });
  try {
    const base = process.env['BASE_URL'] ?? (await serveDemo({ defer: (end) => ends.unshift(end), workDir, distDir: '.data/test/next' })).BASE_URL;
    const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-gpu'] });
    ends.unshift(() => browser.close());
    await measure(browser, base);
  } finally {
    for (const end of ends) await end();
  }
}

async function measure(browser: Browser, base: string): Promise<void> {
  const context = await browser.newContext({ baseURL: base, viewport: WINDOW });
  const page = await context.newPage();
  // The compiler that runs this file names functions with a helper that pages do not have.
  await page.addInitScript('globalThis.__name = (made) => made');
  await markOpened(page);
  await signIn(page, 'assistant');
  const desk = await startReading(page, 'Prelude in C major');
  await timeOpening(page, desk);
  await weighScripts(page, desk);
  await timeRoundTrip(page, desk);
  await addExcerptOf(page, { name: 'bench-quartet.musicxml', xml: quartetXml(BARS, 'A quartet to measure') }, 'A quartet to measure', BARS);
  await page.getByRole('button', { name: 'Start my reading' }).click();
  await page.waitForURL(/\/desk\//);
  await labels(page).first().waitFor();
  await timeEdits(page);
  await timeScrolling(page);
}

/** Milliseconds from the navigation to the first label that takes the keyboard, as the page itself tells. */
async function markOpened(page: Page): Promise<void> {
  await page.addInitScript(() => {
    new MutationObserver((_, observer) => {
      if (!document.querySelector('[data-label][tabindex="0"]')) return;
      observer.disconnect();
      requestAnimationFrame(() => Object.assign(window, { opened: performance.now() }));
    }).observe(document, { subtree: true, childList: true });
  });
}

const told = (page: Page, name: string) => page.waitForFunction((key) => (window as unknown as Record<string, number>)[key], name).then((handle) => handle.jsonValue() as Promise<number>);

/** The desk against a page that does nothing but fetch, load and render the same file with the same engraver. */
async function timeOpening(page: Page, desk: string): Promise<void> {
  const osmd = createRequire(import.meta.url).resolve('opensheetmusicdisplay/build/opensheetmusicdisplay.min.js');
  const score = `/api/readings/${desk.split('/').at(-1)}/score`;
  await page.route('**/bench-osmd.js', (route) => route.fulfill({ contentType: 'text/javascript', body: readFileSync(osmd), headers: { 'cache-control': 'max-age=3600' } }));
  await page.route('**/bench-bare', (route) => route.fulfill({ contentType: 'text/html', body: bareHtml(score) }));
  const [ours, bare]: [number[], number[]] = [[], []];
  for (let turn = 0; turn < TURNS; turn += 1) {
    await page.goto(desk);
    ours.push(await told(page, 'opened'));
    await page.goto('/bench-bare');
    bare.push(await told(page, 'rendered'));
  }
  const ratio = median(ours) / median(bare);
  console.log(`opening a 35-bar excerpt: desk ${round(median(ours))} ms, bare engraving ${round(median(bare))} ms, ratio ${ratio.toFixed(2)} (at most 1.3)`);
}

function bareHtml(score: string): string {
  return `<!doctype html><div id="sheet" style="width:1000px"></div><script src="/bench-osmd.js"></script><script>
    (async () => {
      const blob = await (await fetch('${score}')).blob();
      const osmd = new opensheetmusicdisplay.OpenSheetMusicDisplay('sheet', { backend: 'svg', autoResize: false, drawTitle: false });
      await osmd.load(blob);
      osmd.zoom = 0.8;
      osmd.render();
      requestAnimationFrame(() => { window.rendered = performance.now(); });
    })();
  </script>`;
}

/** What the desk route's scripts weigh until its first label can be edited, compressed, without the engraver; and what every page needs of that. */
async function weighScripts(page: Page, desk: string): Promise<void> {
  const of = async (url: string, ready: string) => {
    const scripts = new Map<string, Buffer>();
    const cold = await page.context().browser()?.newContext({ baseURL: new URL(desk).origin, viewport: WINDOW, storageState: await page.context().storageState() });
    const fresh = await cold?.newPage();
    fresh?.on('response', (response) => {
      if (response.request().resourceType() === 'script') void response.body().then((body) => scripts.set(response.url(), body)).catch(() => undefined);
    });
    await fresh?.goto(url);
    await fresh?.locator(ready).first().waitFor();
    await cold?.close();
    return scripts;
  };
  const scripts = await of(desk, '[data-label]');
  const everywhere = await of('/account', 'h1');
  const isEngraver = (body: Buffer) => body.includes('OpenSheetMusicDisplay') && body.length > 500_000;
  const weigh = (entries: readonly (readonly [string, Buffer])[]) => round(entries.reduce((sum, [, body]) => sum + gzipSync(body, { level: 9 }).length, 0) / 1000);
  const ours = [...scripts].filter(([, body]) => !isEngraver(body));
  console.log(
    `scripts of the desk route: ${weigh(ours)} kB compressed (at most 200), ${weigh(ours.filter(([url]) => everywhere.has(url)))} kB of them on every page; the engraver ${weigh([...scripts].filter(([, body]) => isEngraver(body)))} kB`,
  );
}

/** A saved edit against a route that answers before any work: one asked with a method it has not. */
async function timeRoundTrip(page: Page, desk: string): Promise<void> {
  await page.goto(desk);
  await told(page, 'opened');
  const times = await page.evaluate(
    async ({ base, turns }) => {
      interface Sent { readonly version: number; readonly reading: { readonly labels: readonly { readonly numeral: unknown }[] } }
      const { version, reading } = (await (await fetch(base)).json()) as Sent;
      const [first] = reading.labels;
      let before = { ...first, state: 'changed', certainty: null };
      const [saves, empties]: [number[], number[]] = [[], []];
      const send = async (url: string, method: string, body: unknown) => {
        const from = performance.now();
        const response = await fetch(url, { method, headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) });
        await response.text();
        return { time: performance.now() - from, status: response.status };
      };
      const edit = (from: unknown, to: unknown, baseVersion: number) => ({
        editId: crypto.randomUUID(), baseVersion, words: 'Measured.', change: { labels: { before: [from], after: [to] }, regions: { before: [], after: [] } },
      });
      let at = version;
      await send(`${base}/edits`, 'POST', edit(first, before, at));
      for (let turn = 0; turn < turns; turn += 1) {
        at += 1;
        const after = { ...before, numeral: before.numeral === null ? first?.numeral : null };
        const body = edit(before, after, at);
        const saved = await send(`${base}/edits`, 'POST', body);
        if (saved.status !== 200) throw new Error(`an edit was answered ${saved.status}`);
        saves.push(saved.time);
        empties.push((await send(`${base}/edits`, 'PUT', body)).time);
        before = after as typeof before;
      }
      return { saves, empties };
    },
    { base: `/api/readings/${desk.split('/').at(-1)}`, turns: EDITS },
  );
  const ratio = median(times.saves) / median(times.empties);
  console.log(`a save: ${median(times.saves).toFixed(1)} ms, an empty route ${median(times.empties).toFixed(1)} ms, ratio ${ratio.toFixed(2)} (at most 3)`);
}

/** From the key that writes to the frame that shows it. */
async function timeEdits(page: Page): Promise<void> {
  const count = await page.evaluate(async (base) => ((await (await fetch(base)).json()) as { reading: { labels: unknown[] } }).reading.labels.length, `/api/readings/${page.url().split('/').at(-1)}`);
  await page.evaluate(() => {
    const shown: number[] = [];
    Object.assign(window, { shown });
    let pressed = 0;
    window.addEventListener('keydown', (event) => {
      if (event.key === 'Enter') pressed = event.timeStamp;
    }, true);
    new MutationObserver((changes) => {
      if (pressed === 0 || !changes.some((change) => (change.target as Element).matches('[data-label]'))) return;
      const from = pressed;
      pressed = 0;
      requestAnimationFrame(() => shown.push(performance.now() - from));
    }).observe(document.body, { subtree: true, attributeFilter: ['data-state'] });
  });
  await labels(page).first().click();
  for (let turn = 0; turn < EDITS; turn += 1) {
    await page.keyboard.type(turn % 2 === 0 ? 'vi7' : 'iii6');
    await page.keyboard.press('Enter');
    await page.waitForFunction((wanted) => (window as unknown as { shown: number[] }).shown.length >= wanted, turn + 1, { timeout: 5_000 }).catch(() => undefined);
  }
  const shown = await page.evaluate(() => (window as unknown as { shown: number[] }).shown);
  console.log(`an edit with ${count} labels is seen after ${round(median(shown))} ms, at the 95th percentile ${round(percentile(shown, 0.95))} ms (at most 50), ${shown.length} edits`);
}

/** Frames while a long score is scrolled, a window's height a second. */
async function timeScrolling(page: Page): Promise<void> {
  const frames = await page.evaluate(async () => {
    const region = document.querySelector<HTMLElement>('[data-score-region]');
    if (!region) return [];
    const gaps: number[] = [];
    let last = performance.now();
    const end = last + 6_000;
    return new Promise<number[]>((resolve) => {
      const frame = (now: number) => {
        gaps.push(now - last);
        last = now;
        region.scrollTop += 12;
        if (now < end) requestAnimationFrame(frame);
        else resolve(gaps);
      };
      requestAnimationFrame(frame);
    });
  });
  const nodes = await page.evaluate(() => document.querySelectorAll('*').length);
  console.log(`scrolling: ${round(1000 / median(frames))} frames a second, the slowest frame ${round(Math.max(...frames))} ms, ${nodes} elements on the page`);
}

function median(values: readonly number[]): number {
  return percentile(values, 0.5);
}

function percentile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? Number.NaN;
}

function round(value: number): string {
  return value.toFixed(0);
}
