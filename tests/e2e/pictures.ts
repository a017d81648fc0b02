/** Takes the README's pictures from a running demo: `BASE_URL=http://… node --import tsx tests/e2e/pictures.ts`. */
import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import sharp from 'sharp';
import { chromium, type Browser } from 'playwright-core';
import { browserFlags } from '#tests/support/browserFlags.ts';

const baseURL = process.env.BASE_URL;
if (!baseURL) throw new Error('BASE_URL is not set: run `npm run pictures`.');
const folder = path.join(import.meta.dirname, '..', '..', 'public', 'pictures');

interface Picture {
  readonly file: string;
  readonly as: string;
  readonly buy: string;
  readonly step: string;
  readonly phone?: boolean;
}

const pictures: readonly Picture[] = [
  { file: 'buy-sheet', as: 'imke', buy: 'Winter', step: 'sheet' },
  { file: 'buy-sheet-phone', as: 'imke', buy: 'Winter', step: 'sheet', phone: true },
  { file: 'split', as: 'ravi', buy: 'Autumn', step: 'split' },
  { file: 'settled', as: 'imke', buy: 'Summer', step: 'settled' },
];

async function take(browser: Browser, picture: Picture): Promise<void> {
  const context = await browser.newContext({
    baseURL: baseURL ?? '',
    viewport: picture.phone ? { width: 390, height: 844 } : { width: 1280, height: 900 },
    deviceScaleFactor: picture.phone ? 2 : 1,
    reducedMotion: 'reduce',
  });
  const origin = { Origin: new URL(baseURL ?? '').origin, 'Sec-Fetch-Site': 'same-origin' };
  await context.request.post('/api/v1/session/demo', {
    data: { email: `${picture.as}@quillmere.example` },
    headers: origin,
  });
  const reply = await context.request.get('/api/v1/clubs/quillmere/buys');
  const { buys } = (await reply.json()) as { buys: { id: string; name: string }[] };
  const buy = buys.find(({ name }) => name.startsWith(picture.buy));
  if (!buy) throw new Error(`the demo has no buy ${picture.buy}`);
  const page = await context.newPage();
  await page.goto(`/c/quillmere/buys/${buy.id}/${picture.step}`);
  await page.waitForSelector('main h1');
  await page.waitForLoadState('networkidle');
  await page.waitForFunction(() => !document.querySelector('[aria-busy="true"]'));
  await page.evaluate(() => document.fonts.ready);
  const bytes = await page.screenshot();
  // Few colours: a third of the size, and nothing is lost to the eye.
  await sharp(bytes)
    .png({ palette: true, quality: 90 })
    .toFile(path.join(folder, `${picture.file}.png`));
  await context.close();
}

await mkdir(folder, { recursive: true });
const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: browserFlags });
try {
  for (const picture of pictures) await take(browser, picture);
} finally {
  await browser.close();
}
