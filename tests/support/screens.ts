/**
 * Takes a page's pictures at three widths, light and dark:
 * `node --import tsx tests/support/screens.ts BASE_URL PATH [--as EMAIL] [--out DIR]`
 */
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { chromium, type Browser } from 'playwright-core';
import { browserFlags } from '#tests/support/browserFlags.ts';

const widths = [
  { width: 1440, height: 900 },
  { width: 820, height: 1180 },
  { width: 390, height: 844 },
];

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { as: { type: 'string' }, out: { type: 'string', default: '.data/screens' } },
});
const [base, path = '/'] = positionals;
if (!base) throw new Error('Name the address first, such as http://127.0.0.1:4680');

async function take(browser: Browser, size: (typeof widths)[number], mode: 'light' | 'dark') {
  const context = await browser.newContext({
    viewport: size,
    colorScheme: mode,
    reducedMotion: 'reduce',
    baseURL: base ?? '',
    hasTouch: size.width < 1024,
  });
  try {
    if (values.as) {
      const signedIn = await context.request.post('/api/v1/session/demo', {
        data: { email: values.as },
        headers: { Origin: new URL(base ?? '').origin, 'Sec-Fetch-Site': 'same-origin' },
      });
      if (!signedIn.ok()) throw new Error(`Sign-in as ${values.as}: ${signedIn.status()}`);
    }
    const page = await context.newPage();
    page.on('console', (message) => {
      if (message.type() === 'error') console.log(`  ${size.width} ${mode}: ${message.text()}`);
    });
    await page.goto(path);
    await page.waitForSelector('main h1');
    await page.waitForLoadState('networkidle');
    await page.waitForFunction(() => !document.querySelector('[aria-busy="true"]'));
    await page.evaluate(() => document.fonts.ready);
    await page.waitForTimeout(300);
    const sideways = await page.evaluate(
      () => document.documentElement.scrollWidth > document.documentElement.clientWidth,
    );
    if (sideways) console.log(`  ${size.width} ${mode}: the page scrolls sideways`);
    // As tall as the page, so that what is fixed to the foot stands there and not half-way.
    const height = await page.evaluate(() => document.documentElement.scrollHeight);
    await page.setViewportSize({ width: size.width, height: Math.max(height, size.height) });
    const name = path.replace(/[^a-z0-9]+/gi, '-').replace(/^-|-$/g, '') || 'home';
    const file = join(values.out, `${name}-${size.width}-${mode}.png`);
    await page.screenshot({ path: file });
    console.log(file);
  } finally {
    await context.close();
  }
}

await mkdir(values.out, { recursive: true });
const browser = await chromium.launch({
  executablePath: '/usr/bin/chromium',
  args: browserFlags,
});
try {
  for (const size of widths) {
    for (const mode of ['light', 'dark'] as const) await take(browser, size, mode);
  }
} finally {
  await browser.close();
}
